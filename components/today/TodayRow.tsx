import { StyleSheet, View } from 'react-native';

import type { Task } from '@/shared/contracts/cohorts';
import { t } from '@/shared/messages';
import { clock, day, duration } from '@/shared/when';
import { color, font, space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { LinkButton } from '../ui/Link';
import { Text } from '../ui/Text';
import { Cautions } from './Cautions';
import { StepChips } from './StepChips';

interface TodayRowProps {
  task: Task;
  now: number;
  overdue?: boolean;
  /** The one next action of the page stands in this row. */
  next?: boolean;
  /** On a wide page the work opens beside the list. */
  onOpen?: (() => void) | undefined;
  selected?: boolean;
}

/** Window in words: when it closes or opens, and how long that is from now. */
function windowWords(task: Task, now: number, overdue: boolean): string {
  const [from, to] = [Date.parse(task.windowFrom), Date.parse(task.windowTo)];
  const at = (ms: number) => clock(ms, task.zone);
  if (overdue && now > to) return t('today.overdueSince', { when: `${day(to, task.zone)} ${at(to)}` });
  if (overdue) return t('today.overdueDay', { when: task.dueLocal });
  if (now < from) return t('today.windowTo', { from: at(from), to: at(to) });
  return t('today.closesIn', { clock: at(to), time: duration((to - now) / 60_000) });
}

/** One yarding of the day: time, what, how many, and the way to it. */
export function TodayRow({ task, now, overdue = false, next = false, onOpen, selected }: TodayRowProps) {
  const left = task.head - task.done;
  const finished = task.state === 'done';
  const label = finished
    ? t('today.look')
    : task.done > 0
      ? t('today.goOn', { count: left })
      : t(task.yarded ? 'today.start' : 'today.startPaddock');
  const name = t('today.rowName', {
    clock: clock(Date.parse(task.dueAt), task.zone),
    title: task.title,
    group: task.group,
    property: task.property,
  });
  const kind = next ? 'primary' : 'plain';
  return (
    <View role="listitem" style={[styles.row, overdue && styles.overdue, selected && styles.selected]}>
      <View style={styles.top}>
        <View style={styles.time}>
          <Text style={styles.clock}>{clock(Date.parse(task.dueAt), task.zone)}</Text>
          {overdue ? (
            <Text variant="small" tone="quiet">
              {day(Date.parse(task.dueAt), task.zone)}
            </Text>
          ) : null}
        </View>
        <View style={styles.middle}>
          <Text variant="subheading">{task.title}</Text>
          <Text variant="small" tone="quiet">{`${task.group} · ${task.cohort}`}</Text>
          <Text variant="small" tone={overdue ? 'stop' : 'quiet'} strong={overdue}>
            {finished ? t('today.done') : windowWords(task, now, overdue)}
          </Text>
        </View>
        <View style={styles.head}>
          <Text style={styles.clock}>{finished ? task.head : left}</Text>
          <Text variant="small" tone="quiet">
            {task.done > 0 && !finished ? t('today.left') : t('today.head')}
          </Text>
        </View>
      </View>
      {finished ? null : <StepChips steps={task.steps} />}
      {next ? <Cautions steps={task.steps} only="prostaglandin" /> : null}
      <View style={styles.action}>
        {onOpen ? (
          <Button
            label={label}
            accessibleLabel={`${label}: ${name}`}
            kind={kind}
            size={next ? 64 : 48}
            fill={next}
            onPress={onOpen}
          />
        ) : (
          <LinkButton
            href={{ pathname: '/task/[id]', params: { id: task.id } }}
            label={label}
            accessibleLabel={`${label}: ${name}`}
            kind={kind}
            size={next ? 64 : 48}
            fill={next}
          />
        )}
      </View>
    </View>
  );
}

const styles = StyleSheet.create({
  row: {
    borderBottomWidth: 1,
    borderBottomColor: color.rail,
    paddingVertical: space.m,
    paddingHorizontal: space.m,
    gap: space.xs,
  },
  overdue: { borderLeftWidth: 8, borderLeftColor: color.stop, paddingLeft: space.m - 8 },
  selected: { backgroundColor: color.raised },
  top: { flexDirection: 'row', gap: space.m },
  time: { width: 84 },
  clock: { fontFamily: font.figureBold, fontWeight: '700', fontSize: 34, lineHeight: 38 },
  middle: { flex: 1, minWidth: 0, gap: 2 },
  head: { alignItems: 'flex-end' },
  action: { paddingTop: space.s },
});
