import { View } from 'react-native';

import type { Task } from '@/shared/contracts/cohorts';
import type { Today } from '@/shared/contracts/work';
import { t } from '@/shared/messages';
import { day, zoneName } from '@/shared/when';
import { space } from '../theme/tokens';
import { EmptyState } from '../ui/states';
import { RailList } from '../ui/Rail';
import { Text } from '../ui/Text';
import { NowLine } from './NowLine';
import { TodayRow } from './TodayRow';

type Place = Today['properties'][number];

interface ListProps {
  today: Today;
  now: number;
  onOpen?: ((task: Task) => void) | undefined;
  selected: string | null;
}

const open = (task: Task) => task.state === 'planned' || task.state === 'inWork';

/** The one thing to do next: the next open yarding of the day, else the oldest that is overdue. */
export function nextOf(today: Today): Task | undefined {
  const upcoming = today.properties.flatMap((place) => place.tasks.filter(open));
  upcoming.sort((a, b) => Date.parse(a.dueAt) - Date.parse(b.dueAt));
  return upcoming[0] ?? today.properties.flatMap((place) => place.overdue)[0];
}

/** Overdue, then the day in order with the now-line, place by place. */
export function TodayList({ today, now, onOpen, selected }: ListProps) {
  const next = nextOf(today);
  const several = today.properties.length > 1;
  return (
    <>
      {today.properties.map((place) => (
        <View key={place.propertyId}>
          {several ? <PlaceHeading place={place} now={now} /> : null}
          <PlaceList place={place} now={now} next={next} onOpen={onOpen} selected={selected} />
        </View>
      ))}
    </>
  );
}

const PlaceHeading = ({ place, now }: { place: Place; now: number }) => (
  <View style={{ paddingHorizontal: space.m, paddingTop: space.l, paddingBottom: space.s }}>
    <Text variant="heading" level={2}>
      {place.property}
    </Text>
    <Text variant="small" tone="quiet">{`${day(now, place.zone)} · ${zoneName(now, place.zone)}`}</Text>
  </View>
);

interface PlaceListProps extends Omit<ListProps, 'today'> {
  place: Place;
  next: Task | undefined;
}

function PlaceList({ place, now, next, onOpen, selected }: PlaceListProps) {
  const row = (task: Task, overdue: boolean) => (
    <TodayRow
      key={task.id}
      task={task}
      now={now}
      overdue={overdue}
      next={task.id === next?.id}
      onOpen={onOpen && (() => onOpen(task))}
      selected={task.id === selected}
    />
  );
  const past = place.tasks.filter((task) => Date.parse(task.dueAt) <= now);
  const coming = place.tasks.filter((task) => Date.parse(task.dueAt) > now);
  const nothing = place.tasks.length === 0 && place.overdue.length === 0;
  return (
    <>
      <RailList label={t('today.todayTitle', { property: place.property })}>
        {place.overdue.map((task) => row(task, true))}
        {past.map((task) => row(task, false))}
        {nothing ? null : <NowLine now={now} zone={place.zone} next={coming.find(open)} />}
        {coming.map((task) => row(task, false))}
      </RailList>
      {nothing ? <EmptyState title={t('today.nothing')} next={nextWords(place)} /> : null}
      {!nothing && place.next ? (
        <Text tone="quiet" style={{ padding: space.m }}>
          {nextWords(place)}
        </Text>
      ) : null}
    </>
  );
}

const nextWords = (place: Place): string =>
  place.next
    ? t('today.next', { title: place.next.title, group: place.next.group, when: place.next.dueLocal })
    : t('today.noNext');
