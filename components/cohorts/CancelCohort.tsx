import { useState } from 'react';

import { useCancelCohort } from '@/hooks/useCohorts';
import type { CohortDetail } from '@/shared/contracts/cohorts';
import { t } from '@/shared/messages';
import { Button } from '../ui/Button';
import { Dialog } from '../ui/Dialog';
import { Field } from '../ui/Field';
import { Notice } from '../ui/Notice';
import { failureWords } from '../ui/states';
import { Text } from '../ui/Text';

/** Cancels a cohort, with the reason: it goes into the changes of plan. */
export function CancelCohort({ cohort, open, onClose }: { cohort: CohortDetail; open: boolean; onClose: () => void }) {
  const [reason, setReason] = useState('');
  const cancel = useCancelCohort(cohort.id);
  return (
    <Dialog
      open={open}
      onClose={onClose}
      title={t('cohorts.cancel')}
      actions={
        <>
          <Button
            label={t('cohorts.cancel')}
            kind="danger"
            busy={cancel.isPending}
            disabled={reason.trim() === ''}
            onPress={() => cancel.mutate(reason.trim(), { onSuccess: onClose })}
          />
          <Button label={t('ui.close')} kind="quiet" onPress={onClose} />
        </>
      }
    >
      <Text>{t('cohorts.cancelAsk')}</Text>
      <Field label={t('cohorts.cancelReason')} value={reason} onChange={setReason} multiline rows={2} />
      {cancel.error ? <Notice tone="stop">{failureWords(cancel.error)}</Notice> : null}
    </Dialog>
  );
}
