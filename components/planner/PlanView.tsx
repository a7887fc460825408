import type { UseQueryResult } from '@tanstack/react-query';
import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { useStartCohort } from '@/hooks/useCohorts';
import type { CohortDetail, PlannedTask, PlanPreview } from '@/shared/contracts/cohorts';
import { t } from '@/shared/messages';
import { NeedRow } from '../cohorts/CohortAuthorities';
import { AuthoriseDialog } from '../cohorts/AuthoriseDialog';
import { StepChips } from '../today/StepChips';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { DataTable, type Column } from '../ui/DataTable';
import { Confirm } from '../ui/Dialog';
import { FindingList } from '../ui/Finding';
import { Notice } from '../ui/Notice';
import { RailList } from '../ui/Rail';
import { EmptyState, failureWords, Loaded } from '../ui/states';
import { Text } from '../ui/Text';

interface PlanViewProps {
  cohort: CohortDetail;
  preview: UseQueryResult<PlanPreview>;
  /** True when everything typed is at the server: only then is this the plan of what is seen at the left. */
  settled: boolean;
}

/** What the answers make: findings, what must be authorised, every task, and the way to start. */
export function PlanView({ cohort, preview, settled }: PlanViewProps) {
  return (
    <Loaded query={preview}>
      {(plan) =>
        plan.tasks.length === 0 ? (
          <EmptyState title={t('planner.tasks')} next={t('planner.noPlan')} />
        ) : (
          <Plan cohort={cohort} plan={plan} settled={settled} />
        )
      }
    </Loaded>
  );
}

function Plan({ cohort, plan, settled }: { cohort: CohortDetail; plan: PlanPreview; settled: boolean }) {
  const [need, setNeed] = useState<PlanPreview['needs'][number] | null>(null);
  const mayAuthorise = cohort.abilities.includes('authority.write');
  const groups = [...new Map(plan.tasks.map((task) => [task.groupId, task.group]))];
  return (
    <View style={styles.plan}>
      <StartButton cohort={cohort} plan={plan} settled={settled} />
      <View>
        <Text variant="heading" level={2}>
          {t('protocols.findings')}
        </Text>
        <FindingList findings={plan.findings} label={t('protocols.findings')} none={t('planner.noStop')} />
      </View>
      {plan.needs.length > 0 ? (
        <View>
          <Text variant="heading" level={2}>
            {t('planner.needs')}
          </Text>
          <RailList label={t('planner.needs')}>
            {plan.needs.map((one) => (
              <NeedRow
                key={`${one.active}${one.amount}${one.classes.join()}`}
                need={one}
                {...(mayAuthorise ? { onAuthorise: () => setNeed(one) } : {})}
              />
            ))}
          </RailList>
        </View>
      ) : null}
      {groups.map(([groupId, name]) => (
        <View key={groupId}>
          <Text variant="heading" level={2}>
            {groups.length > 1 ? `${t('planner.tasks')}: ${name}` : t('planner.tasks')}
          </Text>
          <DataTable
            caption={`${t('planner.tasks')}: ${name}`}
            hideCaption
            columns={columns}
            rows={plan.tasks.filter((task) => task.groupId === groupId)}
            rowKey={(task) => `${task.visitId}${task.occurrence}`}
          />
        </View>
      ))}
      {need ? <AuthoriseDialog cohort={cohort} need={need} onClose={() => setNeed(null)} /> : null}
    </View>
  );
}

const columns: Column<PlannedTask>[] = [
  {
    key: 'when',
    title: t('cohorts.when'),
    primary: true,
    cell: (task) => <Text variant="figure">{task.dueLocal}</Text>,
  },
  {
    key: 'what',
    title: t('cohorts.what'),
    cell: (task) => (
      <View>
        <Text strong>{task.title}</Text>
        <StepChips steps={task.steps} />
      </View>
    ),
  },
  {
    key: 'window',
    title: t('cohorts.window'),
    cell: (task) => (
      <View>
        <Text variant="small">{`${task.windowFromLocal} – ${task.windowToLocal}`}</Text>
        {task.sinceAnchor ? (
          <Text variant="small" tone="quiet">
            {task.sinceAnchor}
          </Text>
        ) : null}
      </View>
    ),
  },
  { key: 'head', title: t('cohorts.headColumn'), end: true, cell: (task) => <Text variant="figure">{task.head}</Text> },
];

/** Starts from the very plan that is shown; when it has changed meanwhile the server says so and the new one is fetched. */
function StartButton({ cohort, plan, settled }: { cohort: CohortDetail; plan: PlanPreview; settled: boolean }) {
  const [asking, setAsking] = useState(false);
  const start = useStartCohort(cohort.id);
  const stops = plan.findings.filter((finding) => finding.severity === 'stop').length;
  if (!cohort.abilities.includes('cohort.start')) return <Notice silent>{t('planner.vetStarts')}</Notice>;
  return (
    <View style={styles.start}>
      <Button
        kind="primary"
        size={64}
        fill
        label={t('planner.start')}
        disabled={!plan.canStart || !settled}
        why={stops > 0 ? t('planner.stopped', { count: stops }) : settled ? undefined : t('planner.saving')}
        onPress={() => setAsking(true)}
      />
      <Confirm
        open={asking}
        title={t('planner.start')}
        body={t('planner.startAsk', { name: cohort.name })}
        confirmLabel={t('planner.startConfirm', { count: plan.tasks.length })}
        busy={start.isPending}
        error={start.error ? failureWords(start.error) : undefined}
        onClose={() => setAsking(false)}
        onConfirm={() => start.mutate({ fingerprint: plan.fingerprint, revision: cohort.revision })}
      />
    </View>
  );
}

const styles = StyleSheet.create({ plan: { gap: space.l }, start: { gap: space.s } });
