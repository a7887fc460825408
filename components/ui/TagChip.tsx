import { StyleSheet, View } from 'react-native';
import Svg, { Circle, Path } from 'react-native-svg';

import { t } from '@/shared/messages';
import { color, font } from '../theme/tokens';
import { Text } from './Text';

type Size = 's' | 'm' | 'l';

/** Height of the plate, of its neck, size of the figures and weight of the outline, in pixels. */
const measures: Record<Size, { plate: number; neck: number; figures: number; stroke: number }> = {
  s: { plate: 26, neck: 9, figures: 18, stroke: 1.6 },
  m: { plate: 38, neck: 13, figures: 27, stroke: 2.4 },
  l: { plate: 112, neck: 34, figures: 92, stroke: 7 },
};

/** Outline of an ear tag: a plate with rounded corners, and a neck that narrows upwards. */
export function tagOutline(width: number, plate: number, neck: number, stroke: number): string {
  const o = stroke / 2;
  const right = width - o;
  const bottom = neck + plate - o;
  const r = Math.min(plate / 8, 12);
  const half = neck * 1.9;
  const top = neck * 1.1;
  const mid = width / 2;
  return [
    `M${o + r} ${neck}H${mid - half}L${mid - top} ${o}H${mid + top}L${mid + half} ${neck}H${right - r}`,
    `Q${right} ${neck} ${right} ${neck + r}V${bottom - r}Q${right} ${bottom} ${right - r} ${bottom}H${o + r}`,
    `Q${o} ${bottom} ${o} ${bottom - r}V${neck + r}Q${o} ${neck} ${o + r} ${neck}Z`,
  ].join('');
}

/** An animal's number as its ear tag. Screen readers hear "tag" and the number. */
export function TagChip({ tag, size = 'm' }: { tag: string; size?: Size }) {
  const { plate, neck, figures, stroke } = measures[size];
  const width = Math.max(neck * 5.2, tag.length * figures * 0.5 + figures * 0.9);
  const height = plate + neck;
  return (
    <View role="img" aria-label={t('ui.tag', { tag })} style={[styles.chip, { width, height }]}>
      <View style={StyleSheet.absoluteFill}>
        <Svg width={width} height={height} viewBox={`0 0 ${width} ${height}`}>
          <Path
            d={tagOutline(width, plate, neck, stroke)}
            fill={color.raised}
            stroke={color.ink}
            strokeWidth={stroke}
            strokeLinejoin="round"
          />
          <Circle
            cx={width / 2}
            cy={neck * 0.72}
            r={neck * 0.32}
            fill={color.page}
            stroke={color.ink}
            strokeWidth={stroke * 0.8}
          />
        </Svg>
      </View>
      <Text
        aria-hidden
        numberOfLines={1}
        align="center"
        style={{
          fontFamily: font.figureBold,
          fontWeight: '700',
          fontSize: figures,
          lineHeight: plate,
          marginTop: neck,
        }}
      >
        {tag}
      </Text>
    </View>
  );
}

const styles = StyleSheet.create({ chip: { alignSelf: 'flex-start', flexShrink: 0 } });
