import { router } from 'expo-router';
import { useState } from 'react';

import { useSignOut } from '@/hooks/useSession';
import { outboxEntries } from '@/lib/outbox';
import { t } from '@/shared/messages';
import { Button } from '../ui/Button';
import { Confirm } from '../ui/Dialog';
import { Notice } from '../ui/Notice';
import { failureWords } from '../ui/states';

/** Signs out; asks once when records are only on this device. */
export function SignOut() {
  const [asking, setAsking] = useState(0);
  const signOut = useSignOut();
  const leave = () => {
    setAsking(0);
    signOut.mutate(undefined, { onSuccess: () => router.replace('/sign-in') });
  };
  const press = () => {
    const waiting = outboxEntries().length;
    if (waiting > 0) setAsking(waiting);
    else leave();
  };
  return (
    <>
      {signOut.error ? <Notice tone="stop">{failureWords(signOut.error)}</Notice> : null}
      <Button label={t('more.signOut')} onPress={press} busy={signOut.isPending} />
      <Confirm
        open={asking > 0}
        title={t('more.signOutTitle')}
        body={t('more.signOutBody', { count: asking })}
        confirmLabel={t('more.signOut')}
        onConfirm={leave}
        onClose={() => setAsking(0)}
      />
    </>
  );
}
