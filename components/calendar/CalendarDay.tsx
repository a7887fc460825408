import { StyleSheet, View } from 'react-native';

import type { Task } from '@/shared/contracts/cohorts';
import { t } from '@/shared/messages';
import { clock, day } from '@/shared/when';
import { useWide } from '../theme/layout';
import { color, space } from '../theme/tokens';
import { Link } from '../ui/Link';
import { Text } from '../ui/Text';
import { TreatmentMark } from '../ui/TreatmentMark';

interface DayProps {
  date: string;
  isToday: boolean;
  isWeekend: boolean;
  tasks: readonly Task[];
  /** Words of each holiday. */
  holidays: readonly string[];
  showProperty: boolean;
  /** Whether the person may open the work of a task. */
  opens: (task: Task) => boolean;
}

/** One day of the week: its name, what it is, and its yardings in order of time. */
export function CalendarDay(props: DayProps) {
  const { date, isToday, isWeekend, tasks, holidays, showProperty, opens } = props;
  const wide = useWide();
  return (
    <View role="listitem" style={[wide ? styles.column : styles.row, isToday && styles.today]}>
      <View style={styles.head}>
        <Text variant="subheading" level={2}>
          {day(Date.parse(`${date}T12:00:00Z`), 'UTC')}
        </Text>
        {isToday ? (
          <Text variant="small" strong tone="onVis" style={styles.now}>
            {t('today.title')}
          </Text>
        ) : null}
        {holidays.map((words) => (
          <Text key={words} variant="small" tone="warn" strong>
            {words}
          </Text>
        ))}
        {isWeekend ? (
          <Text variant="small" tone="quiet">
            {t('calendar.weekend')}
          </Text>
        ) : null}
      </View>
      {tasks.length === 0 && !wide ? (
        <Text variant="small" tone="quiet">
          {t('calendar.nothing')}
        </Text>
      ) : null}
      {tasks.map((task) => (
        <Entry key={task.id} task={task} showProperty={showProperty} opens={opens(task)} />
      ))}
    </View>
  );
}

function Entry({ task, showProperty, opens }: { task: Task; showProperty: boolean; opens: boolean }) {
  return (
    <View style={styles.entry}>
      <Text variant="figure">{clock(Date.parse(task.dueAt), task.zone)}</Text>
      <View style={styles.marks}>
        {task.steps.map((step) => (
          <TreatmentMark key={step.id} kind={step.kind} size={20} />
        ))}
      </View>
      {opens ? (
        <Link href={{ pathname: '/task/[id]', params: { id: task.id } }}>{task.title}</Link>
      ) : (
        <Text strong>{task.title}</Text>
      )}
      <Text variant="small" tone="quiet">
        {[
          task.group,
          t('cohorts.head', { count: task.head }),
          showProperty ? task.property : null,
          task.state === 'done' ? t('today.done') : null,
        ]
          .filter(Boolean)
          .join(' · ')}
      </Text>
    </View>
  );
}

const styles = StyleSheet.create({
  column: {
    flex: 1,
    minWidth: 0,
    borderRightWidth: 1,
    borderRightColor: color.rail,
    padding: space.s,
    gap: space.s,
    minHeight: 420,
  },
  row: { paddingVertical: space.m, borderBottomWidth: 1, borderBottomColor: color.rail, gap: space.s },
  today: { backgroundColor: color.raised },
  head: { gap: 2 },
  now: { backgroundColor: color.vis, alignSelf: 'flex-start', paddingHorizontal: 6 },
  entry: { borderTopWidth: 1, borderTopColor: color.rail, paddingTop: space.s },
  marks: { flexDirection: 'row', flexWrap: 'wrap', gap: 4 },
});
