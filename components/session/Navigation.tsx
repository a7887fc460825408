import { Link as RouterLink, usePathname } from 'expo-router';
import { Pressable, ScrollView, StyleSheet, View } from 'react-native';

import { useCan, useMe } from '@/hooks/useMe';
import { usePlace } from '@/hooks/usePlace';
import { t } from '@/shared/messages';
import { zoneName } from '@/shared/when';
import { color, font, space } from '../theme/tokens';
import { useNow } from '../ui/clock';
import { Link } from '../ui/Link';
import { GlyphMark } from '../ui/marks/GlyphMark';
import { placeGlyphs } from '../ui/marks/glyphs';
import { Text } from '../ui/Text';
import { Brand } from './Brand';
import { isCurrent, openTo, phoneNavigation, wideNavigation, type Place } from './places';
import { PlaceSwitch } from './PlaceSwitch';

function Item({ place, current, wide }: { place: Place; current: boolean; wide: boolean }) {
  const ink = wide ? (current ? color.page : color.ink) : current ? color.ink : color.quiet;
  return (
    <RouterLink href={place.href} asChild>
      <Pressable
        {...(current ? { 'aria-current': 'page' } : {})}
        // one object: the router merges its own style into this one, and can't merge lists
        style={StyleSheet.flatten([
          wide ? styles.railItem : styles.tab,
          current && (wide ? styles.railCurrent : styles.tabCurrent),
        ])}
      >
        <GlyphMark glyph={placeGlyphs[place.name]} size={24} stroke={ink} />
        <Text strong variant={wide ? 'body' : 'small'} style={{ color: ink, fontFamily: font.bodyBold }}>
          {t(place.word)}
        </Text>
      </Pressable>
    </RouterLink>
  );
}

/** Five tabs at the thumb. */
export function BottomBar() {
  const pathname = usePathname();
  const can = useCan();
  return (
    <View role="navigation" aria-label={t('nav.main')} style={styles.bar}>
      {openTo(phoneNavigation, can).map((place) => (
        <Item key={place.name} place={place} current={isCurrent(place, pathname)} wide={false} />
      ))}
    </View>
  );
}

/** All places at the left, then where one is and who one is. */
export function SideRail() {
  const pathname = usePathname();
  const can = useCan();
  const { data: me } = useMe();
  const { property } = usePlace();
  const now = useNow(3_600_000);
  return (
    <View role="navigation" aria-label={t('nav.main')} style={styles.rail}>
      <View style={styles.brand}>
        <Brand />
      </View>
      <ScrollView style={styles.places}>
        {openTo(wideNavigation, can).map((place) => (
          <Item key={place.name} place={place} current={isCurrent(place, pathname)} wide />
        ))}
      </ScrollView>
      <View style={styles.bottom}>
        <PlaceSwitch />
        {property ? (
          <Text variant="small" tone="quiet">
            {t('nav.zone', { zone: property.zone.replace('_', ' '), short: zoneName(now, property.zone) })}
          </Text>
        ) : null}
        {me ? <Link href="/more">{me.user.name}</Link> : null}
      </View>
    </View>
  );
}

const styles = StyleSheet.create({
  bar: {
    flexDirection: 'row',
    borderTopWidth: 1,
    borderTopColor: color.ink,
    backgroundColor: color.raised,
  },
  tab: {
    flex: 1,
    minHeight: 64,
    minWidth: 0,
    alignItems: 'center',
    justifyContent: 'center',
    gap: 2,
    borderTopWidth: 4,
    borderTopColor: 'transparent',
  },
  tabCurrent: { borderTopColor: color.ink },
  rail: { width: 208, flexShrink: 0, borderRightWidth: 3, borderRightColor: color.ink, backgroundColor: color.raised },
  brand: { paddingHorizontal: 20, paddingVertical: space.m },
  places: { flex: 1 },
  railItem: {
    flexDirection: 'row',
    alignItems: 'center',
    gap: 12,
    minHeight: 48,
    paddingHorizontal: 20,
    // the focus ring lies inside: the rail's edge would cut it
    outlineOffset: -4,
  },
  railCurrent: { backgroundColor: color.ink },
  bottom: { padding: 20, gap: space.s },
});
