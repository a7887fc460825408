import { router } from 'expo-router';
import { useEffect } from 'react';
import { StyleSheet, View } from 'react-native';

import { usePlan } from '@/hooks/useCohorts';
import type { CohortDetail } from '@/shared/contracts/cohorts';
import { t } from '@/shared/messages';
import { useWide } from '../theme/layout';
import { color, space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { Notice } from '../ui/Notice';
import { failureWords, Loading } from '../ui/states';
import { Text } from '../ui/Text';
import { PlanFields } from './PlanFields';
import { PlanView } from './PlanView';
import { usePlanForm } from './usePlanForm';

/** The plan's questions at the left (phone: above), what they make at the right (phone: below). */
export function PlanCohort({ cohort }: { cohort: CohortDetail }) {
  const wide = useWide();
  const plan = usePlanForm(cohort);
  const preview = usePlan(cohort.id, cohort.revision, cohort.state === 'planning');
  const over = cohort.state !== 'planning';
  useEffect(() => {
    // started, here or by somebody else: its place is the cohort itself
    if (over) router.replace({ pathname: '/cohorts/[id]', params: { id: cohort.id } });
  }, [over, cohort.id]);
  if (over) return <Loading />;
  return (
    <View style={wide ? styles.wide : styles.phone}>
      <View style={wide ? styles.left : null}>
        <PlanFields cohort={cohort} form={plan.form} change={plan.change} version={plan.version} />
        <SaveState plan={plan} />
      </View>
      <View style={wide ? styles.right : styles.below}>
        <PlanView cohort={cohort} preview={preview} settled={!plan.dirty && !plan.saving} />
      </View>
    </View>
  );
}

/** Whether what is typed is at the server; when it is not, why, and how to go on. */
function SaveState({ plan }: { plan: ReturnType<typeof usePlanForm> }) {
  if (plan.error && plan.dirty)
    return (
      <Notice tone="stop" action={<Button label={t('ui.retry')} onPress={() => void plan.retry()} />}>
        {t('planner.unsaved', { message: failureWords(plan.error) })}
      </Notice>
    );
  return (
    <Text variant="small" tone="quiet" role="status">
      {plan.saving || plan.dirty ? t('planner.saving') : t('planner.saved')}
    </Text>
  );
}

const styles = StyleSheet.create({
  wide: { flexDirection: 'row', gap: space.xl, alignItems: 'flex-start' },
  phone: { gap: space.l },
  left: { width: 400, flexShrink: 0 },
  right: { flex: 1, minWidth: 0, borderLeftWidth: 1, borderLeftColor: color.rail, paddingLeft: space.xl },
  below: { borderTopWidth: 3, borderTopColor: color.ink, paddingTop: space.m },
});
