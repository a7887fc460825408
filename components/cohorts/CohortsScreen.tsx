import { StyleSheet, View } from 'react-native';

import { useCohorts } from '@/hooks/useCohorts';
import { useCan } from '@/hooks/useMe';
import { usePlace } from '@/hooks/usePlace';
import type { CohortSummary } from '@/shared/contracts/cohorts';
import { t, tData } from '@/shared/messages';
import { Button } from '../ui/Button';
import { LinkButton } from '../ui/Link';
import { RailList, RailRow } from '../ui/Rail';
import { Screen } from '../ui/Screen';
import { EmptyState, Loaded } from '../ui/states';
import { SeverityMark } from '../ui/SeverityMark';
import { Text } from '../ui/Text';

/** Cohorts of every place, by what is next. */
export function CohortsScreen() {
  const { propertyId } = usePlace();
  const can = useCan();
  const query = useCohorts(propertyId);
  const mayPlan = can('cohort.plan');
  const plan = mayPlan ? <LinkButton href="/cohorts/new" label={t('cohorts.new')} kind="primary" /> : null;
  return (
    <Screen title={t('cohorts.title')} toolbar={plan} padded={false}>
      <Loaded query={query}>
        {(data) => {
          const items = data.pages.flatMap((page) => page.items);
          if (items.length === 0)
            return (
              <EmptyState
                title={t('cohorts.empty')}
                next={t(mayPlan ? 'cohorts.emptyManager' : 'cohorts.emptyOther')}
              />
            );
          return (
            <View>
              <RailList label={t('cohorts.title')}>
                {items.map((cohort) => (
                  <CohortRow key={cohort.id} cohort={cohort} mayPlan={can('cohort.plan', cohort.propertyId)} />
                ))}
              </RailList>
              {query.hasNextPage ? (
                <Button
                  label={t('ui.more')}
                  onPress={() => void query.fetchNextPage()}
                  busy={query.isFetchingNextPage}
                />
              ) : null}
            </View>
          );
        }}
      </Loaded>
    </Screen>
  );
}

function CohortRow({ cohort, mayPlan }: { cohort: CohortSummary; mayPlan: boolean }) {
  const planning = cohort.state === 'planning' && mayPlan;
  const href = planning
    ? ({ pathname: '/cohorts/[id]/plan', params: { id: cohort.id } } as const)
    : ({ pathname: '/cohorts/[id]', params: { id: cohort.id } } as const);
  const protocol = cohort.protocolName
    ? t('cohorts.protocolVersion', { name: cohort.protocolName, number: cohort.protocolVersion ?? 0 })
    : t('cohorts.noProtocol');
  return (
    <RailRow
      href={href}
      title={cohort.name}
      {...(cohort.overdue > 0 ? { mark: 'stop' as const } : {})}
      subtitle={
        <View style={styles.lines}>
          <Text variant="small" tone="quiet">{`${cohort.property} · ${protocol}`}</Text>
          <Text variant="small" strong>
            {nextWords(cohort)}
          </Text>
          {cohort.findings.stop > 0 && cohort.state === 'planning' ? (
            <View style={styles.stop}>
              <SeverityMark severity="stop" size={16} />
              <Text variant="small" tone="stop" strong>
                {t('planner.stopped', { count: cohort.findings.stop })}
              </Text>
            </View>
          ) : null}
        </View>
      }
      trailing={
        <View style={styles.end}>
          <Text variant="figure">{cohort.head}</Text>
          <Text variant="small" tone="quiet">
            {tData(`cohorts.state.${cohort.state}`, cohort.state)}
          </Text>
          {cohort.overdue > 0 ? (
            <Text variant="small" tone="stop" strong>
              {t('cohorts.overdue', { count: cohort.overdue })}
            </Text>
          ) : null}
        </View>
      }
    />
  );
}

function nextWords(cohort: CohortSummary): string {
  if (cohort.next)
    return t('cohorts.next', { title: `${cohort.next.title}, ${cohort.next.group}`, when: cohort.next.dueLocal });
  if (cohort.state === 'planning') return t('cohorts.goOnPlanning');
  return cohort.serviceLocal ? t('cohorts.service', { when: cohort.serviceLocal }) : '';
}

const styles = StyleSheet.create({
  lines: { gap: 2 },
  stop: { flexDirection: 'row', alignItems: 'center', gap: 6 },
  end: { alignItems: 'flex-end' },
});
