import { View } from 'react-native';
import Svg, { Circle, Path } from 'react-native-svg';

import { color } from '../../theme/tokens';
import type { Glyph } from './glyphs';

interface GlyphMarkProps {
  glyph: Glyph;
  size?: number;
  stroke?: string;
}

/** Draws a glyph; never read aloud, since its word stands beside it. */
export const GlyphMark = ({ glyph, size = 24, stroke = color.ink }: GlyphMarkProps) => (
  <View aria-hidden style={{ width: size, height: size, flexShrink: 0 }}>
    <Svg width={size} height={size} viewBox="0 0 24 24">
      {glyph.paths?.map((d) => (
        <Path
          key={d}
          d={d}
          fill="none"
          stroke={stroke}
          strokeWidth={1.9}
          strokeLinecap="round"
          strokeLinejoin="round"
        />
      ))}
      {glyph.circles?.map(([x, y, r]) => (
        <Circle key={`${x}-${y}`} cx={x} cy={y} r={r} fill="none" stroke={stroke} strokeWidth={1.9} />
      ))}
    </Svg>
  </View>
);
