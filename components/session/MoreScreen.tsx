import { StyleSheet, View } from 'react-native';

import { useCan, useMe } from '@/hooks/useMe';
import { t } from '@/shared/messages';
import { useWide } from '../theme/layout';
import { useTheme, type ThemeChoice } from '../theme/theme';
import { space } from '../theme/tokens';
import { GlyphMark } from '../ui/marks/GlyphMark';
import { placeGlyphs } from '../ui/marks/glyphs';
import { Segmented } from '../ui/RadioGroup';
import { RailList, RailRow } from '../ui/Rail';
import { Screen } from '../ui/Screen';
import { Loaded } from '../ui/states';
import { Text } from '../ui/Text';
import { openTo, underMore } from './places';
import { PlaceSwitch } from './PlaceSwitch';
import { Reminders } from './Reminders';
import { SignOut } from './SignOut';

const themes: readonly ThemeChoice[] = ['system', 'light', 'dark'];

function MorePlaces() {
  const can = useCan();
  return (
    <View style={styles.part}>
      <PlaceSwitch />
      <RailList label={t('more.places')}>
        {openTo(underMore, can).map((place) => (
          <RailRow
            key={place.name}
            href={place.href}
            leading={<GlyphMark glyph={placeGlyphs[place.name]} />}
            title={t(place.name === 'people' ? 'more.peopleToo' : place.word)}
          />
        ))}
      </RailList>
    </View>
  );
}

export function MoreScreen() {
  const me = useMe();
  const wide = useWide();
  const { choice, setChoice } = useTheme();
  return (
    <Screen title={t('more.title')}>
      {wide ? null : <MorePlaces />}
      <View style={styles.part}>
        <Segmented
          label={t('more.theme')}
          value={choice}
          onChange={setChoice}
          options={themes.map((value) => ({ value, label: t(`more.${value}`) }))}
        />
      </View>
      <Loaded query={me}>
        {(data) => (
          <>
            <View style={styles.part}>
              <Text variant="heading" level={2}>
                {t('more.reminders')}
              </Text>
              <Reminders key={data.user.id} me={data} />
            </View>
            <View style={styles.part}>
              <Text variant="heading" level={2}>
                {t('more.you')}
              </Text>
              <Text>{data.user.name}</Text>
              <Text tone="quiet">{t('more.signedIn', { email: data.user.email })}</Text>
              <SignOut />
            </View>
          </>
        )}
      </Loaded>
    </Screen>
  );
}

const styles = StyleSheet.create({ part: { gap: space.m, marginBottom: space.l, maxWidth: 480 } });
