import { useState } from 'react';

import { useAskReset } from '@/hooks/useSession';
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

export function AskResetScreen() {
  const [email, setEmail] = useState('');
  const [tried, setTried] = useState(false);
  const ask = useAskReset();
  const send = () => {
    setTried(true);
    if (email.trim()) ask.mutate(email.trim());
  };
  const missing = tried && email.trim() === '' ? t('signIn.emailMissing') : undefined;
  return (
    <Outside title={t('reset.title')}>
      {ask.isSuccess ? (
        <Notice tone="good">{t('reset.sent', { email: ask.variables })}</Notice>
      ) : (
        <Form onSubmit={send}>
          <Text>{t('reset.intro')}</Text>
          <Field
            label={t('signIn.email')}
            kind="email"
            autoComplete="username"
            value={email}
            onChange={setEmail}
            error={missing ?? fieldError(ask.error, 'email')}
          />
          {ask.error ? <Notice tone="stop">{failureWords(ask.error)}</Notice> : null}
          <Button kind="primary" label={t('reset.send')} onPress={send} busy={ask.isPending} />
        </Form>
      )}
      <Link href="/sign-in">{t('reset.back')}</Link>
    </Outside>
  );
}
