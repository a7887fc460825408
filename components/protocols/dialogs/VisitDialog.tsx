import { useState } from 'react';

import type { Visit } from '@/protocols/types';
import { t } from '@/shared/messages';
import { Button } from '../../ui/Button';
import { Checkbox } from '../../ui/Checkbox';
import { Dialog } from '../../ui/Dialog';
import { Field } from '../../ui/Field';
import { updateVisit } from '../edit/edit';
import type { PartProps } from '../BenchEdit';

/** Name of a visit, and whether it goes through the yards. */
export function VisitDialog({ visit, change, onClose }: PartProps & { visit: Visit }) {
  const [label, setLabel] = useState(visit.label);
  const [yarded, setYarded] = useState(visit.yarded);
  return (
    <Dialog
      open
      onClose={onClose}
      title={t('protocols.editVisit')}
      actions={
        <>
          <Button
            label={t('protocols.done')}
            disabled={label.trim() === ''}
            onPress={() => {
              change((before) => updateVisit(before, visit.id, { label: label.trim(), yarded }));
              onClose();
            }}
          />
          <Button label={t('ui.cancel')} kind="quiet" onPress={onClose} />
        </>
      }
    >
      <Field label={t('protocols.visitLabel')} value={label} onChange={setLabel} maxLength={120} />
      <Checkbox label={t('protocols.yarded')} checked={yarded} onChange={setYarded} />
    </Dialog>
  );
}
