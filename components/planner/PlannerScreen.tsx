import { router, useLocalSearchParams } from 'expo-router';
import { useState } from 'react';

import { useCohort, useCreateCohort } from '@/hooks/useCohorts';
import { useOneProperty } from '@/hooks/usePlace';
import { fieldError } from '@/lib/api';
import { newId } from '@/lib/ids';
import { useKept } from '@/lib/keep';
import { t } from '@/shared/messages';
import { Button } from '../ui/Button';
import { Field } from '../ui/Field';
import { Form } from '../ui/Form';
import { Notice } from '../ui/Notice';
import { Screen } from '../ui/Screen';
import { Select } from '../ui/Select';
import { EmptyState, failureWords, Loaded } from '../ui/states';
import { PlanCohort } from './PlanCohort';

/** Begins a cohort, then plans it: protocol, animals, when, look, start. */
export function PlannerScreen() {
  const { id } = useLocalSearchParams<{ id?: string }>();
  return id ? <Planned id={id} /> : <Begin />;
}

function Planned({ id }: { id: string }) {
  const query = useCohort(id);
  return (
    <Screen
      title={query.data?.name ?? t('planner.title')}
      kicker={query.data ? `${query.data.property} · ${t('cohorts.state.planning')}` : undefined}
      back={{ href: '/cohorts', label: t('cohorts.title') }}
      width="full"
    >
      <Loaded query={query}>{(cohort) => <PlanCohort key={cohort.id} cohort={cohort} />}</Loaded>
    </Screen>
  );
}

function Begin() {
  const { property, properties, choose } = useOneProperty('cohort.plan');
  const [form, setForm, accepted] = useKept('cohort-new', { id: newId(), name: '' });
  const [tried, setTried] = useState(false);
  const create = useCreateCohort();
  const missing = form.name.trim() === '';
  const begin = () => {
    setTried(true);
    if (missing || !property) return;
    create.mutate(
      { propertyId: property.id, body: { id: form.id, name: form.name.trim() } },
      {
        onSuccess: (cohort) => {
          accepted();
          setForm({ id: newId(), name: '' });
          accepted();
          router.replace({ pathname: '/cohorts/[id]/plan', params: { id: cohort.id } });
        },
      },
    );
  };
  return (
    <Screen title={t('planner.title')} back={{ href: '/cohorts', label: t('cohorts.title') }}>
      {property ? (
        <Form onSubmit={begin}>
          {properties.length > 1 ? (
            <Select
              label={t('planner.property')}
              value={property.id}
              onChange={choose}
              options={properties.map((one) => ({ value: one.id, label: one.name }))}
            />
          ) : null}
          <Field
            label={t('planner.name')}
            value={form.name}
            onChange={(name) => setForm({ ...form, name })}
            error={tried && missing ? t('planner.needName') : fieldError(create.error, 'name')}
          />
          {create.error ? <Notice tone="stop">{failureWords(create.error)}</Notice> : null}
          <Button kind="primary" label={t('planner.begin')} onPress={begin} busy={create.isPending} />
        </Form>
      ) : (
        <EmptyState title={t('cohorts.empty')} next={t('cohorts.emptyOther')} />
      )}
    </Screen>
  );
}
