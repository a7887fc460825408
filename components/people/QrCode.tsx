import qrcode from 'qrcode-generator';
import { View } from 'react-native';
import Svg, { Path, Rect } from 'react-native-svg';

/** Empty modules around the code, as ISO/IEC 18004 asks (from memory). */
const margin = 4;

/** A QR code as one path; black on white in both schemes, because readers expect it so. */
export function QrCode({ text, label, size = 220 }: { text: string; label: string; size?: number }) {
  const code = qrcode(0, 'M');
  code.addData(text);
  code.make();
  const count = code.getModuleCount();
  const cells = Array.from({ length: count * count }, (_, at) => [Math.floor(at / count), at % count] as const);
  const path = cells
    .filter(([row, column]) => code.isDark(row, column))
    .map(([row, column]) => `M${column + margin} ${row + margin}h1v1h-1Z`)
    .join('');
  const side = count + 2 * margin;
  return (
    <View role="img" aria-label={label} style={{ width: size, height: size }}>
      <Svg width={size} height={size} viewBox={`0 0 ${side} ${side}`}>
        <Rect width={side} height={side} fill="#FFFFFF" />
        <Path d={path} fill="#000000" />
      </Svg>
    </View>
  );
}
