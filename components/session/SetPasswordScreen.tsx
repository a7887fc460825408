import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';

import { useSetPassword } from '@/hooks/useSession';
import { fieldError } from '@/lib/api';
import { t } from '@/shared/messages';
import { Button } from '../ui/Button';
import { Field } from '../ui/Field';
import { Form } from '../ui/Form';
import { Link, LinkButton } from '../ui/Link';
import { Notice } from '../ui/Notice';
import { failureWords } from '../ui/states';
import { Text } from '../ui/Text';
import { Outside } from './Outside';

/** Least length of a password; the server asks for the same. */
export const leastPassword = 12;

export function SetPasswordScreen() {
  const { token } = useLocalSearchParams<'/reset/[token]'>();
  const [password, setPassword] = useState('');
  const [tried, setTried] = useState(false);
  const save = useSetPassword(token);
  const short = password.length < leastPassword;
  const send = () => {
    setTried(true);
    if (!short) save.mutate(password);
  };
  if (save.isSuccess) {
    return (
      <Outside title={t('reset.title')}>
        <Notice tone="good">{t('reset.done')}</Notice>
        <LinkButton href="/sign-in" kind="primary" label={t('reset.back')} />
      </Outside>
    );
  }
  return (
    <Outside title={t('reset.title')}>
      <Form onSubmit={send}>
        <Text>{t('reset.setIntro')}</Text>
        <Field
          label={t('reset.password')}
          hint={t('reset.passwordHint')}
          kind="password"
          autoComplete="new-password"
          value={password}
          onChange={setPassword}
          error={tried && short ? t('reset.short') : fieldError(save.error, 'password')}
        />
        {save.error ? (
          <Notice tone="stop" title={t('reset.failed')}>
            {failureWords(save.error)}
          </Notice>
        ) : null}
        <Button kind="primary" label={t('reset.set')} onPress={send} busy={save.isPending} />
      </Form>
      <Link href="/reset">{t('reset.again')}</Link>
    </Outside>
  );
}
