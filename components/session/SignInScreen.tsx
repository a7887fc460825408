import { router, useLocalSearchParams, type Href } from 'expo-router';
import { useState } from 'react';

import { useSignIn } from '@/hooks/useSession';
import { fieldError } from '@/lib/api';
import { t } from '@/shared/messages';
import { Button } from '../ui/Button';
import { Field } from '../ui/Field';
import { Form } from '../ui/Form';
import { Link } from '../ui/Link';
import { Notice } from '../ui/Notice';
import { failureWords } from '../ui/states';
import { Text } from '../ui/Text';
import { Outside } from './Outside';

/** Where the person was going; only a place of this program, never another site. */
export const backTo = (back: string | string[] | undefined): Href =>
  typeof back === 'string' && /^\/(?![/\\])/.test(back) ? (back as Href) : '/';

export function SignInScreen() {
  const { back } = useLocalSearchParams<{ back?: string }>();
  const [email, setEmail] = useState('');
  const [password, setPassword] = useState('');
  const [tried, setTried] = useState(false);
  const signIn = useSignIn();
  const send = () => {
    setTried(true);
    if (email.trim() === '' || password === '') return;
    signIn.mutate({ email: email.trim(), password }, { onSuccess: () => router.replace(backTo(back)) });
  };
  const missing = (value: string, words: 'signIn.emailMissing' | 'signIn.passwordMissing') =>
    tried && value.trim() === '' ? t(words) : undefined;
  return (
    <Outside title={t('signIn.title')}>
      <Form onSubmit={send} label={t('signIn.title')}>
        <Field
          label={t('signIn.email')}
          kind="email"
          autoComplete="username"
          value={email}
          onChange={setEmail}
          error={missing(email, 'signIn.emailMissing') ?? fieldError(signIn.error, 'email')}
        />
        <Field
          label={t('signIn.password')}
          kind="password"
          autoComplete="current-password"
          value={password}
          onChange={setPassword}
          error={missing(password, 'signIn.passwordMissing') ?? fieldError(signIn.error, 'password')}
        />
        {signIn.error ? (
          <Notice tone="stop" title={t('signIn.failed')}>
            {failureWords(signIn.error)}
          </Notice>
        ) : null}
        <Button kind="primary" label={t('signIn.button')} onPress={send} busy={signIn.isPending} fill size={64} />
      </Form>
      <Link href="/reset">{t('signIn.forgot')}</Link>
      <Text variant="small" tone="quiet">
        {t('signIn.byInvitation')}
      </Text>
    </Outside>
  );
}
