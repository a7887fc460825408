import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { useCan } from '@/hooks/useMe';
import { useProperty } from '@/hooks/usePeople';
import { usePlace } from '@/hooks/usePlace';
import { useCalendar } from '@/hooks/useToday';
import { t } from '@/shared/messages';
import type { Output } from '@/shared/routes';
import { day, localOf } from '@/shared/when';
import { useWide } from '../theme/layout';
import { color, space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { useNow } from '../ui/clock';
import { Screen } from '../ui/Screen';
import { Loaded } from '../ui/states';
import { Text } from '../ui/Text';
import { CalendarDay } from './CalendarDay';
import { addDays, mondayOf, weekdayOf } from './dates';

/** ISO weekdays that are days off where no single property says its own. */
const usualWeekend = [6, 7];

/** The week: what is planned, day by day, with weekends and holidays said. */
export function CalendarScreen() {
  const { propertyId, property, properties } = usePlace();
  const wide = useWide();
  const can = useCan();
  const zone = (property ?? properties[0])?.zone ?? 'UTC';
  const today = localOf(useNow(), zone).slice(0, 10);
  // weeks away from the one that is now, so that the page follows when the week turns
  const [away, setAway] = useState(0);
  const monday = addDays(mondayOf(today), away * 7);
  const days = Array.from({ length: 7 }, (_, i) => addDays(monday, i));
  const query = useCalendar(monday, days[6] ?? monday, propertyId);
  const weekend = useProperty(propertyId ?? '').data?.weekendDays ?? usualWeekend;
  const many = propertyId === null && properties.length > 1;
  const title = t('calendar.week', { day: day(Date.parse(`${monday}T12:00:00Z`), 'UTC', undefined, true) });
  return (
    <Screen
      title={t('calendar.title')}
      subtitle={title}
      width="full"
      toolbar={
        <>
          <Button label={t('calendar.earlier')} onPress={() => setAway(away - 1)} />
          <Button label={t('calendar.thisWeek')} onPress={() => setAway(0)} disabled={away === 0} />
          <Button label={t('calendar.later')} onPress={() => setAway(away + 1)} />
        </>
      }
    >
      {/* the week before is not shown as this one while this one is on its way */}
      <Loaded query={query.isPlaceholderData ? { ...query, data: undefined } : query}>
        {(data) => (
          <View style={{ gap: space.m }}>
            <Text tone="quiet" role="status">
              {data.tasks.length === 0 ? t('calendar.nothingWeek') : ''}
            </Text>
            <View role="list" aria-label={title} style={wide ? styles.wide : styles.phone}>
              {days.map((date) => (
                <CalendarDay
                  key={date}
                  date={date}
                  isToday={date === today}
                  isWeekend={weekend.includes(weekdayOf(date))}
                  tasks={tasksOn(data.tasks, date)}
                  holidays={holidaysOn(data.holidays, date, many ? properties : [])}
                  showProperty={many}
                  opens={(task) => can('work.read', task.propertyId)}
                />
              ))}
            </View>
          </View>
        )}
      </Loaded>
    </Screen>
  );
}

type Week = Output<'GET /api/calendar'>;

/** Each task on the day it has at its own property, in order of time. */
const tasksOn = (tasks: Week['tasks'], date: string) =>
  tasks
    .filter((task) => localOf(Date.parse(task.dueAt), task.zone).slice(0, 10) === date)
    .sort((a, b) => Date.parse(a.dueAt) - Date.parse(b.dueAt));

/** Words for each holiday; with the property's name where several are shown, since they don't share their holidays. */
function holidaysOn(
  holidays: Week['holidays'],
  date: string,
  named: readonly { id: string; name: string }[],
): string[] {
  const words = holidays
    .filter((holiday) => holiday.date === date)
    .map(({ propertyId, name }) => {
      const property = named.find((one) => one.id === propertyId)?.name;
      return property ? t('calendar.holidayAt', { name, property }) : t('calendar.holiday', { name });
    });
  return [...new Set(words)];
}

const styles = StyleSheet.create({
  wide: { flexDirection: 'row', borderTopWidth: 1, borderTopColor: color.rail },
  phone: { borderTopWidth: 1, borderTopColor: color.rail },
});
