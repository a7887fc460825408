import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { useCan } from '@/hooks/useMe';
import { usePlace } from '@/hooks/usePlace';
import { useCalendar } from '@/hooks/useToday';
import { t } from '@/shared/messages';
import { day, localOf } from '@/shared/when';
import { useWide } from '../theme/layout';
import { color, space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { useNow } from '../ui/clock';
import { Screen } from '../ui/Screen';
import { Loaded } from '../ui/states';
import { Text } from '../ui/Text';
import { CalendarDay } from './CalendarDay';
import { addDays, mondayOf } from './dates';

/** The week: what is planned, day by day, with weekends and holidays said. */
export function CalendarScreen() {
  const { propertyId, properties } = usePlace();
  const wide = useWide();
  const can = useCan();
  const zone = properties.find((property) => property.id === propertyId)?.zone ?? properties[0]?.zone ?? 'UTC';
  const today = localOf(useNow(), zone).slice(0, 10);
  const [monday, setMonday] = useState(mondayOf(today));
  const days = Array.from({ length: 7 }, (_, i) => addDays(monday, i));
  const query = useCalendar(monday, days[6] ?? monday, propertyId);
  const title = t('calendar.week', { day: day(Date.parse(`${monday}T12:00:00Z`), 'UTC', undefined, true) });
  return (
    <Screen
      title={t('calendar.title')}
      subtitle={title}
      width="full"
      toolbar={
        <>
          <Button label={t('calendar.earlier')} onPress={() => setMonday(addDays(monday, -7))} />
          <Button label={t('calendar.thisWeek')} onPress={() => setMonday(mondayOf(today))} />
          <Button label={t('calendar.later')} onPress={() => setMonday(addDays(monday, 7))} />
        </>
      }
    >
      <Loaded query={query}>
        {(data) => (
          <View style={{ gap: space.m }}>
            {data.tasks.length === 0 ? <Text tone="quiet">{t('calendar.nothingWeek')}</Text> : null}
            <View role="list" aria-label={title} style={wide ? styles.wide : styles.phone}>
              {days.map((date) => (
                <CalendarDay
                  key={date}
                  date={date}
                  isToday={date === today}
                  tasks={data.tasks.filter((task) => localOf(Date.parse(task.dueAt), task.zone).slice(0, 10) === date)}
                  holidays={data.holidays.filter((holiday) => holiday.date === date).map((holiday) => holiday.name)}
                  showProperty={propertyId === null && properties.length > 1}
                  opens={can('work.read')}
                />
              ))}
            </View>
          </View>
        )}
      </Loaded>
    </Screen>
  );
}

const styles = StyleSheet.create({
  wide: { flexDirection: 'row', borderTopWidth: 1, borderTopColor: color.rail },
  phone: { borderTopWidth: 1, borderTopColor: color.rail },
});
