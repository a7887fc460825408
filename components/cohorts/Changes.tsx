import { useAudit } from '@/hooks/useCohorts';
import type { CohortDetail } from '@/shared/contracts/cohorts';
import { t } from '@/shared/messages';
import { dayClock } from '@/shared/when';
import { RailList, RailRow } from '../ui/Rail';
import { Loaded } from '../ui/states';
import { Text } from '../ui/Text';

/** Every change of plan: when, who, what. */
export function Changes({ cohort }: { cohort: CohortDetail }) {
  const may = cohort.abilities.includes('audit.read');
  const query = useAudit(cohort.id, may);
  if (!may) return <Text tone="quiet">{t('cohorts.changesHidden')}</Text>;
  return (
    <Loaded query={query}>
      {(data) => (
        <RailList label={t('cohorts.changes')}>
          {data.items.map((entry) => (
            <RailRow
              key={entry.id}
              title={entry.summary}
              subtitle={[dayClock(Date.parse(entry.at), cohort.zone), entry.by].filter(Boolean).join(' · ')}
            />
          ))}
        </RailList>
      )}
    </Loaded>
  );
}
