import { useState } from 'react';

import type { useCalendarLinkActions } from '@/hooks/useCalendarLinks';
import { usePlace } from '@/hooks/usePlace';
import { fieldError } from '@/lib/api';
import { t } from '@/shared/messages';
import { Button } from '../ui/Button';
import { Field } from '../ui/Field';
import { Form } from '../ui/Form';
import { Notice } from '../ui/Notice';
import { Select } from '../ui/Select';
import { failureWords } from '../ui/states';

interface NewLinkProps {
  make: ReturnType<typeof useCalendarLinkActions>['make'];
  onMade: (link: { label: string; url: string }) => void;
}

const all = 'all';

/** Makes a calendar link for one property, or for all that the person sees. */
export function NewLink({ make, onMade }: NewLinkProps) {
  const { properties } = usePlace();
  const [label, setLabel] = useState('');
  const [place, setPlace] = useState(all);
  const [tried, setTried] = useState(false);
  const send = () => {
    setTried(true);
    if (label.trim() === '') return;
    make.mutate(
      { label: label.trim(), propertyId: place === all ? null : place },
      {
        onSuccess: (link) => {
          setLabel('');
          setTried(false);
          onMade(link);
        },
      },
    );
  };
  const missing = tried && label.trim() === '' ? t('links.labelHint') : undefined;
  return (
    <Form onSubmit={send} label={t('links.make')}>
      <Field
        label={t('links.label')}
        hint={missing ? undefined : t('links.labelHint')}
        value={label}
        onChange={setLabel}
        maxLength={120}
        error={missing ?? fieldError(make.error, 'label')}
      />
      {properties.length > 1 ? (
        <Select
          label={t('links.what')}
          value={place}
          onChange={setPlace}
          options={[
            { value: all, label: t('links.all') },
            ...properties.map(({ id, name }) => ({ value: id, label: name })),
          ]}
        />
      ) : null}
      {make.error ? <Notice tone="stop">{failureWords(make.error)}</Notice> : null}
      <Button label={t('links.make')} onPress={send} busy={make.isPending} />
    </Form>
  );
}
