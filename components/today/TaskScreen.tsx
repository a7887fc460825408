import { useLocalSearchParams } from 'expo-router';

import { useTaskWork } from '@/hooks/useTaskWork';
import { t } from '@/shared/messages';
import { Screen } from '../ui/Screen';
import { KeptBar } from './KeptBar';
import { TaskPanel } from './TaskPanel';

/** The work of one yarding, at the crush. */
export function TaskScreen() {
  const { id } = useLocalSearchParams<'/task/[id]'>();
  const { data } = useTaskWork(id);
  return (
    <Screen
      title={data ? data.task.title : t('task.give')}
      back={{ href: '/', label: t('task.back') }}
      {...(data ? { subtitle: `${data.task.group} · ${data.task.cohort} · ${data.task.property}` } : {})}
    >
      <KeptBar />
      <TaskPanel taskId={id} titled />
    </Screen>
  );
}
