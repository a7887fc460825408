import { router, useLocalSearchParams } from 'expo-router';
import { useState } from 'react';

import { useAcceptInvitation, useInvitation } from '@/hooks/useSession';
import { ApiFailure, fieldError } from '@/lib/api';
import { t, tData } from '@/shared/messages';
import type { Output } from '@/shared/routes';
import { Button } from '../ui/Button';
import { Field } from '../ui/Field';
import { Form } from '../ui/Form';
import { Link } from '../ui/Link';
import { Notice } from '../ui/Notice';
import { ErrorState, failureWords, Loading } from '../ui/states';
import { Text } from '../ui/Text';
import { Outside } from './Outside';
import { leastPassword } from './SetPasswordScreen';

type Look = Output<'GET /api/invitations/:token'>;

function AcceptForm({ token, look }: { token: string; look: Look }) {
  const [name, setName] = useState('');
  const [password, setPassword] = useState('');
  const [tried, setTried] = useState(false);
  const accept = useAcceptInvitation(token);
  const nameError = !look.known && name.trim() === '' ? t('invitation.nameMissing') : undefined;
  const enough = look.known ? password !== '' : password.length >= leastPassword;
  const passwordError = enough ? undefined : t(look.known ? 'signIn.passwordMissing' : 'reset.short');
  const send = () => {
    setTried(true);
    if (nameError || passwordError) return;
    const body = { password, ...(look.known ? {} : { name: name.trim() }) };
    accept.mutate(body, { onSuccess: () => router.replace('/') });
  };
  return (
    <Form onSubmit={send} label={t('invitation.title')}>
      <Text>{t(look.known ? 'invitation.known' : 'invitation.new')}</Text>
      {look.known ? null : (
        <Field
          label={t('invitation.name')}
          hint={t('invitation.nameHint')}
          autoComplete="name"
          value={name}
          onChange={setName}
          error={(tried ? nameError : undefined) ?? fieldError(accept.error, 'name')}
        />
      )}
      <Field
        label={t('signIn.password')}
        hint={look.known ? undefined : t('reset.passwordHint')}
        kind="password"
        autoComplete={look.known ? 'current-password' : 'new-password'}
        value={password}
        onChange={setPassword}
        error={(tried ? passwordError : undefined) ?? fieldError(accept.error, 'password')}
      />
      {accept.error ? (
        <Notice tone="stop" title={t('invitation.failed')}>
          {failureWords(accept.error)}
        </Notice>
      ) : null}
      <Button
        kind="primary"
        label={t('invitation.accept', { place: look.place })}
        onPress={send}
        busy={accept.isPending}
      />
    </Form>
  );
}

export function InvitationScreen() {
  const { token } = useLocalSearchParams<'/invitation/[token]'>();
  const look = useInvitation(token);
  const over = look.error instanceof ApiFailure && look.error.status >= 400 && look.error.status < 429;
  return (
    <Outside title={t('invitation.title')}>
      {look.isPending ? <Loading /> : null}
      {over ? (
        <>
          <Notice tone="stop">{failureWords(look.error)}</Notice>
          <Text>{t('invitation.gone')}</Text>
        </>
      ) : look.error ? (
        <ErrorState error={look.error} onRetry={() => void look.refetch()} />
      ) : null}
      {look.data ? (
        <>
          <Text variant="subheading" level={2}>
            {t('invitation.sentence', {
              by: look.data.invitedBy,
              email: look.data.email,
              place: look.data.place,
              role: tData(`role.${look.data.role}`, look.data.role),
            })}
          </Text>
          <AcceptForm token={token} look={look.data} />
        </>
      ) : null}
      <Link href="/sign-in">{t('reset.back')}</Link>
    </Outside>
  );
}
