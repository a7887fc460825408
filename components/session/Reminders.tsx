import { useState } from 'react';

import { useSaveMe } from '@/hooks/useSession';
import { fieldError } from '@/lib/api';
import type { Me } from '@/shared/contracts/people';
import { t } from '@/shared/messages';
import { Button } from '../ui/Button';
import { Checkbox } from '../ui/Checkbox';
import { TimeField } from '../ui/DateTimeField';
import { Form } from '../ui/Form';
import { Notice } from '../ui/Notice';
import { failureWords } from '../ui/states';
import { toast } from '../ui/toast';

/** When the person wants to be reminded by e-mail. */
export function Reminders({ me }: { me: Me }) {
  const [form, setForm] = useState(me.preferences);
  const save = useSaveMe();
  const change = (part: Partial<typeof form>) => setForm((before) => ({ ...before, ...part }));
  const send = () => save.mutate({ preferences: form }, { onSuccess: () => toast(t('ui.saved')) });
  return (
    <Form onSubmit={send} label={t('more.reminders')}>
      <Checkbox label={t('more.evening')} checked={form.evening} onChange={(evening) => change({ evening })} />
      {form.evening ? (
        <TimeField
          label={t('more.eveningAt')}
          hint={t('more.zoneHint')}
          value={form.eveningAt}
          onChange={(eveningAt) => change({ eveningAt })}
          error={fieldError(save.error, 'preferences.eveningAt')}
        />
      ) : null}
      <Checkbox label={t('more.morning')} checked={form.morning} onChange={(morning) => change({ morning })} />
      {form.morning ? (
        <TimeField
          label={t('more.morningAt')}
          hint={t('more.zoneHint')}
          value={form.morningAt}
          onChange={(morningAt) => change({ morningAt })}
          error={fieldError(save.error, 'preferences.morningAt')}
        />
      ) : null}
      <Checkbox label={t('more.closing')} checked={form.closing} onChange={(closing) => change({ closing })} />
      {save.error ? <Notice tone="stop">{failureWords(save.error)}</Notice> : null}
      <Button label={t('more.saveReminders')} onPress={send} busy={save.isPending} />
    </Form>
  );
}
