import type { usePeopleActions } from '@/hooks/usePeople';
import { fieldError } from '@/lib/api';
import { useKept } from '@/lib/keep';
import { t } from '@/shared/messages';
import { useState } from 'react';
import { Button } from '../ui/Button';
import { Field } from '../ui/Field';
import { Form } from '../ui/Form';
import { Notice } from '../ui/Notice';
import { RadioGroup } from '../ui/RadioGroup';
import { failureWords } from '../ui/states';
import { Text } from '../ui/Text';
import { toast } from '../ui/toast';

const invitable = ['staff', 'manager', 'calendarOnly'] as const;
type Invitable = (typeof invitable)[number];

interface InviteFormProps {
  propertyId: string;
  invite: ReturnType<typeof usePeopleActions>['invite'];
}

/** Invites a person to the property by e-mail. */
export function InviteForm({ propertyId, invite }: InviteFormProps) {
  const empty: { email: string; role: Invitable } = { email: '', role: 'staff' };
  const [form, setForm, accepted] = useKept(`invite-${propertyId}`, empty);
  const [tried, setTried] = useState(false);
  const missing = form.email.trim() === '' ? t('signIn.emailMissing') : undefined;
  const send = () => {
    setTried(true);
    if (missing) return;
    const email = form.email.trim();
    invite.mutate(
      { email, role: form.role },
      {
        onSuccess: () => {
          setForm(empty);
          accepted();
          setTried(false);
          toast(t('people.invited', { email }));
        },
      },
    );
  };
  return (
    <Form onSubmit={send} label={t('people.invite')}>
      <Text variant="subheading" level={3}>
        {t('people.invite')}
      </Text>
      <Field
        label={t('people.inviteEmail')}
        kind="email"
        value={form.email}
        onChange={(email) => setForm((before) => ({ ...before, email }))}
        error={(tried ? missing : undefined) ?? fieldError(invite.error, 'email')}
      />
      <RadioGroup
        label={t('people.role')}
        hint={t('people.vetsNote')}
        value={form.role}
        onChange={(role) => setForm((before) => ({ ...before, role }))}
        options={invitable.map((value) => ({ value, label: t(`role.${value}`), hint: t(`roleHint.${value}`) }))}
      />
      {invite.error ? <Notice tone="stop">{failureWords(invite.error)}</Notice> : null}
      <Button label={t('people.inviteSend')} onPress={send} busy={invite.isPending} />
    </Form>
  );
}
