import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';

import { useCohort } from '@/hooks/useCohorts';
import type { CohortDetail, Task } from '@/shared/contracts/cohorts';
import { t, tData } from '@/shared/messages';
import { dayClock, zoneName } from '@/shared/when';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { FindingList } from '../ui/Finding';
import { LinkButton } from '../ui/Link';
import { PageTabs } from '../ui/PageTabs';
import { Screen } from '../ui/Screen';
import { Loaded } from '../ui/states';
import { Text } from '../ui/Text';
import { CancelCohort } from './CancelCohort';
import { Changes } from './Changes';
import { CohortAuthorities } from './CohortAuthorities';
import { CohortTasks } from './CohortTasks';
import { MoveDialog } from './MoveDialog';

type Tab = 'tasks' | 'authorities' | 'findings' | 'changes';

/** A cohort: its task calendar by group, what is authorised, what was found, and every change of plan. */
export function CohortScreen() {
  const { id } = useLocalSearchParams<'/cohorts/[id]'>();
  const query = useCohort(id);
  const cohort = query.data;
  return (
    <Screen
      title={cohort?.name ?? t('cohorts.title')}
      back={{ href: '/cohorts', label: t('cohorts.title') }}
      width="full"
      {...(cohort
        ? { kicker: kickerOf(cohort), subtitle: subtitleOf(cohort), toolbar: <Toolbar cohort={cohort} /> }
        : {})}
    >
      <Loaded query={query}>{(data) => <CohortContent cohort={data} />}</Loaded>
    </Screen>
  );
}

const kickerOf = (cohort: CohortDetail): string =>
  `${cohort.property} · ${tData(`cohorts.state.${cohort.state}`, cohort.state)}`;

const subtitleOf = (cohort: CohortDetail): string =>
  [
    cohort.protocolName
      ? t('cohorts.protocolVersion', { name: cohort.protocolName, number: cohort.protocolVersion ?? 0 })
      : t('cohorts.noProtocol'),
    t('cohorts.head', { count: cohort.head }),
    cohort.serviceLocal ? t('cohorts.service', { when: cohort.serviceLocal }) : null,
    cohort.startedBy && cohort.startedAt
      ? t('cohorts.startedBy', { name: cohort.startedBy, when: dayClock(Date.parse(cohort.startedAt), cohort.zone) })
      : null,
  ]
    .filter(Boolean)
    .join(' · ');

function Toolbar({ cohort }: { cohort: CohortDetail }) {
  const [cancelling, setCancelling] = useState(false);
  const may = (ability: string) => cohort.abilities.includes(ability);
  return (
    <>
      {cohort.state === 'planning' && may('cohort.plan') ? (
        <LinkButton
          href={{ pathname: '/cohorts/[id]/plan', params: { id: cohort.id } }}
          label={t('cohorts.goOnPlanning')}
          kind="primary"
        />
      ) : null}
      {(cohort.state === 'planning' || cohort.state === 'running') && may('cohort.cancel') ? (
        <Button label={t('cohorts.cancel')} kind="quiet" onPress={() => setCancelling(true)} />
      ) : null}
      <CancelCohort cohort={cohort} open={cancelling} onClose={() => setCancelling(false)} />
    </>
  );
}

function CohortContent({ cohort }: { cohort: CohortDetail }) {
  const [tab, setTab] = useState<Tab>('tasks');
  const [moving, setMoving] = useState<Task | null>(null);
  const mayMove = cohort.abilities.includes('task.move') && cohort.state === 'running';
  return (
    <View style={{ gap: space.m }}>
      <Text variant="small" tone="quiet">
        {t('cohorts.times', {
          zone: zoneName(cohort.tasks[0] ? Date.parse(cohort.tasks[0].dueAt) : 0, cohort.zone),
          place: cohort.property,
        })}
      </Text>
      <PageTabs
        label={cohort.name}
        value={tab}
        onChange={setTab}
        tabs={[
          { value: 'tasks', label: t('cohorts.tasks') },
          { value: 'authorities', label: t('cohorts.authorities') },
          { value: 'findings', label: `${t('protocols.findings')} ${cohort.planFindings.length}` },
          { value: 'changes', label: t('cohorts.changes') },
        ]}
      >
        {tab === 'tasks' ? <CohortTasks cohort={cohort} {...(mayMove ? { onMove: setMoving } : {})} /> : null}
        {tab === 'authorities' ? <CohortAuthorities cohort={cohort} /> : null}
        {tab === 'findings' ? (
          <FindingList findings={cohort.planFindings} label={t('cohorts.findings')} none={t('protocols.noFindings')} />
        ) : null}
        {tab === 'changes' ? <Changes cohort={cohort} /> : null}
      </PageTabs>
      {moving ? <MoveDialog task={moving} onClose={() => setMoving(null)} /> : null}
    </View>
  );
}
