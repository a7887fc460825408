import { StyleSheet, View } from 'react-native';

import { propertyOf, useMe } from '@/hooks/useMe';
import { t } from '@/shared/messages';
import type { Output } from '@/shared/routes';
import { clock, localOf } from '@/shared/when';
import { color, space } from '../theme/tokens';
import { Text } from '../ui/Text';
import { dateWords } from './words';

type Detail = Output<'GET /api/animals/:animalId'>;

interface Point {
  key: string;
  /** `YYYY-MM-DD`, with `THH:MM` where the time is known: sorts as text. */
  local: string;
  when: string;
  title: string;
  detail: string;
}

/** Everything that bears a date, newest first: what was recorded, and the dates that are known of the animal. */
function pointsOf(animal: Detail, zone: string): Point[] {
  const recorded = animal.events.map((event, i) => {
    const at = Date.parse(event.at);
    const local = localOf(at, zone);
    return {
      key: `${event.at}-${i}`,
      local,
      when: `${dateWords(local.slice(0, 10))} ${clock(at, zone)}`,
      title: event.title,
      detail: [event.detail, event.by].filter(Boolean).join(' · '),
    };
  });
  const known = (['birth', 'lastCalving', 'lastService'] as const).flatMap((field) => {
    const local = animal[field];
    return local ? [{ key: field, local, when: dateWords(local), title: t(`herd.${field}`), detail: '' }] : [];
  });
  return [...recorded, ...known].sort((a, b) => b.local.localeCompare(a.local));
}

/** The history of an animal as one line of dates. */
export function AnimalHistory({ animal }: { animal: Detail }) {
  const zone = propertyOf(useMe().data, animal.propertyId)?.zone ?? 'UTC';
  const points = pointsOf(animal, zone);
  return (
    <View style={styles.history}>
      <Text variant="heading" level={2}>
        {t('herd.history')}
      </Text>
      {points.length === 0 ? <Text tone="quiet">{t('herd.noHistory')}</Text> : null}
      {points.length > 0 ? (
        <View role="list" aria-label={t('herd.history')} style={styles.line}>
          {points.map((point) => (
            <View role="listitem" key={point.key} style={styles.point}>
              <View style={styles.dot} />
              <View style={styles.when}>
                <Text variant="figure">{point.when}</Text>
              </View>
              <View style={styles.what}>
                <Text strong>{point.title}</Text>
                {point.detail ? (
                  <Text variant="small" tone="quiet">
                    {point.detail}
                  </Text>
                ) : null}
              </View>
            </View>
          ))}
        </View>
      ) : null}
    </View>
  );
}

const dot = 13;
const stroke = 3;

const styles = StyleSheet.create({
  history: { gap: space.m },
  line: { marginLeft: dot / 2, borderLeftWidth: stroke, borderLeftColor: color.ink },
  point: { flexDirection: 'row', flexWrap: 'wrap', columnGap: space.m, paddingLeft: space.m, paddingBottom: space.m },
  // centred on the line, level with the first words
  dot: {
    position: 'absolute',
    left: -(dot + stroke) / 2,
    top: 7,
    width: dot,
    height: dot,
    borderRadius: dot,
    borderWidth: stroke,
    borderColor: color.ink,
    backgroundColor: color.page,
  },
  when: { width: 168 },
  what: { flexGrow: 1, flexShrink: 1, flexBasis: 180, minWidth: 0 },
});
