import { useState } from 'react';
import { View } from 'react-native';

import { useFlush } from '@/hooks/useTaskWork';
import { usePlace } from '@/hooks/usePlace';
import { useToday } from '@/hooks/useToday';
import type { Today } from '@/shared/contracts/work';
import { t } from '@/shared/messages';
import { day, zoneName } from '@/shared/when';
import { useWide } from '../theme/layout';
import { useNow } from '../ui/clock';
import { Screen } from '../ui/Screen';
import { SplitPane } from '../ui/SplitPane';
import { EmptyState, Loaded } from '../ui/states';
import { KeptBar } from './KeptBar';
import { TaskPanel } from './TaskPanel';
import { nextOf, TodayList } from './TodayList';

/** What to give now, to whom, how much, by when. Overdue on top. */
export function TodayScreen() {
  const { propertyId } = usePlace();
  const query = useToday(propertyId);
  const now = useNow();
  const wide = useWide();
  const [chosen, setChosen] = useState<string | null>(null);
  useFlush();
  const one = query.data?.properties.length === 1 ? query.data.properties[0] : undefined;
  const title = one ? day(now, one.zone) : t('today.title');
  const subtitle = one ? t('today.zone', { property: one.property, zone: zoneName(now, one.zone) }) : undefined;
  const content = (today: Today) => {
    if (today.properties.length === 0) return <EmptyState title={t('today.nothing')} next={t('today.noPlaces')} />;
    const selected = chosen ?? nextOf(today)?.id ?? null;
    if (!wide) return <TodayList today={today} now={now} selected={null} />;
    return (
      <SplitPane
        listLabel={t('today.title')}
        detailLabel={t('task.give')}
        listWidth={480}
        list={<TodayList today={today} now={now} selected={selected} onOpen={(task) => setChosen(task.id)} />}
        detail={selected ? <TaskPanel key={selected} taskId={selected} /> : null}
      />
    );
  };
  return (
    <Screen
      title={title}
      {...(subtitle ? { subtitle } : {})}
      width={wide ? 'full' : 'reading'}
      scroll={!wide}
      padded={false}
    >
      <View style={wide ? { flex: 1, minHeight: 0 } : null}>
        <KeptBar />
        <Loaded query={query}>{content}</Loaded>
      </View>
    </Screen>
  );
}
