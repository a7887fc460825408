import { View } from 'react-native';

import { GlyphMark } from '../ui/marks/GlyphMark';
import { placeGlyphs } from '../ui/marks/glyphs';
import { Text } from '../ui/Text';

/** The bell that rings at the yards, and the name. */
export const Brand = () => (
  <View style={{ flexDirection: 'row', alignItems: 'center', gap: 12 }}>
    <GlyphMark glyph={placeGlyphs.today} size={30} />
    <Text variant="heading">Yardbell</Text>
  </View>
);
