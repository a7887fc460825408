import { useState } from 'react';
import { View } from 'react-native';

import { animalClasses } from '@/protocols/types';
import { t, tData } from '@/shared/messages';
import { Button } from '../../ui/Button';
import { Checkbox } from '../../ui/Checkbox';
import { Dialog } from '../../ui/Dialog';
import { Field } from '../../ui/Field';
import { Select } from '../../ui/Select';
import { Text } from '../../ui/Text';
import { stepName } from '../edit/words';
import type { PartProps } from '../BenchEdit';

/** Name, for whom, and the two steps that everything is counted by. */
export function DetailsDialog({ body, change, onClose }: PartProps) {
  const [name, setName] = useState(body.name);
  const [summary, setSummary] = useState(body.summary);
  const [classes, setClasses] = useState(body.classes);
  const [timingAnchor, setAnchor] = useState(body.timingAnchor);
  const [serviceStep, setService] = useState(body.serviceStep);
  const steps = body.steps.map((step) => ({ value: step.id, label: stepName(step) }));
  return (
    <Dialog
      open
      onClose={onClose}
      title={t('protocols.editDetails')}
      actions={
        <>
          <Button
            label={t('protocols.done')}
            disabled={name.trim() === '' || classes.length === 0}
            onPress={() => {
              change((before) => ({
                ...before,
                name: name.trim(),
                summary: summary.trim(),
                classes,
                timingAnchor,
                serviceStep,
              }));
              onClose();
            }}
          />
          <Button label={t('ui.cancel')} kind="quiet" onPress={onClose} />
        </>
      }
    >
      <Field label={t('protocols.name')} value={name} onChange={setName} maxLength={120} />
      <Field label={t('protocols.summary')} value={summary} onChange={setSummary} multiline rows={3} maxLength={1000} />
      <View>
        <Text strong>{t('protocols.classes')}</Text>
        {animalClasses.map((value) => (
          <Checkbox
            key={value}
            label={tData(`class.${value}`, value)}
            checked={classes.includes(value)}
            onChange={(on) => setClasses(on ? [...classes, value] : classes.filter((one) => one !== value))}
          />
        ))}
      </View>
      <Select label={t('protocols.timingAnchor')} value={timingAnchor} onChange={setAnchor} options={steps} />
      <Select label={t('protocols.serviceStep')} value={serviceStep} onChange={setService} options={steps} />
    </Dialog>
  );
}
