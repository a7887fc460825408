import { StyleSheet, View } from 'react-native';

import type { CohortDetail, Task } from '@/shared/contracts/cohorts';
import { t, tData } from '@/shared/messages';
import { dayClock } from '@/shared/when';
import { StepChips } from '../today/StepChips';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { DataTable, type Column } from '../ui/DataTable';
import { Link } from '../ui/Link';
import { Text } from '../ui/Text';

/** Each group has its own task calendar. */
export function CohortTasks({ cohort, onMove }: { cohort: CohortDetail; onMove?: (task: Task) => void }) {
  const mayWork = cohort.abilities.includes('work.read');
  return (
    <View style={styles.groups}>
      {cohort.groupList.map((group) => {
        const tasks = cohort.tasks.filter((task) => task.groupId === group.id);
        return (
          <View key={group.id}>
            <Text variant="heading" level={2}>
              {group.name}
            </Text>
            <Text variant="small" tone="quiet">
              {[
                t('cohorts.head', { count: group.head }),
                tData(`class.${group.class}`, group.class),
                group.serviceLocal ? t('cohorts.service', { when: group.serviceLocal }) : null,
              ]
                .filter(Boolean)
                .join(' · ')}
            </Text>
            <DataTable
              caption={`${t('cohorts.tasks')}: ${group.name}`}
              hideCaption
              columns={columns(mayWork, onMove)}
              rows={tasks}
              rowKey={(task) => task.id}
            />
          </View>
        );
      })}
    </View>
  );
}

function columns(mayWork: boolean, onMove?: (task: Task) => void): Column<Task>[] {
  const list: Column<Task>[] = [
    {
      key: 'when',
      title: t('cohorts.when'),
      primary: true,
      cell: (task) => (
        <View>
          <Text variant="figure">{task.dueLocal}</Text>
          {task.movedFrom ? (
            <Text variant="small" tone="warn">
              {t('cohorts.movedFrom', { when: dayClock(Date.parse(task.movedFrom), task.zone) })}
            </Text>
          ) : null}
        </View>
      ),
    },
    {
      key: 'what',
      title: t('cohorts.what'),
      cell: (task) => (
        <View>
          {mayWork ? (
            <Link href={{ pathname: '/task/[id]', params: { id: task.id } }}>{task.title}</Link>
          ) : (
            <Text strong>{task.title}</Text>
          )}
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
    {
      key: 'head',
      title: t('cohorts.headColumn'),
      end: true,
      cell: (task) => <Text variant="figure">{task.head}</Text>,
    },
    {
      key: 'done',
      title: t('cohorts.doneColumn'),
      end: true,
      cell: (task) => <Text variant="figure">{task.done}</Text>,
    },
  ];
  if (!onMove) return list;
  return [
    ...list,
    {
      key: 'move',
      title: t('cohorts.move'),
      cell: (task) =>
        task.state === 'planned' || task.state === 'inWork' ? (
          <Button
            label={t('cohorts.move')}
            accessibleLabel={t('cohorts.moveTask', { title: task.title, group: task.group })}
            onPress={() => onMove(task)}
          />
        ) : null,
    },
  ];
}

const styles = StyleSheet.create({ groups: { gap: space.l } });
