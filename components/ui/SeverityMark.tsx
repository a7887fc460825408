import { View } from 'react-native';
import Svg, { Circle, Path, Rect } from 'react-native-svg';

import { color } from '../theme/tokens';

export type Severity = 'stop' | 'warn' | 'note';

/** Solid square, open triangle, open circle: told apart without colour. Always stands with its word. */
export function SeverityMark({ severity, size = 22 }: { severity: Severity; size?: number }) {
  return (
    <View aria-hidden style={{ paddingTop: 2 }}>
      <Svg width={size} height={size} viewBox="0 0 22 22">
        {severity === 'stop' ? <Rect x={2} y={2} width={18} height={18} fill={color.stop} /> : null}
        {severity === 'warn' ? (
          <Path d="M11 3 20 19H2Z" fill="none" stroke={color.warn} strokeWidth={2.4} strokeLinejoin="round" />
        ) : null}
        {severity === 'note' ? (
          <Circle cx={11} cy={11} r={8.4} fill="none" stroke={color.note} strokeWidth={2.4} />
        ) : null}
      </Svg>
    </View>
  );
}
