import { View } from 'react-native';

import type { StepKind } from '@/protocols/types';
import { tData } from '@/shared/messages';
import { GlyphMark } from './marks/GlyphMark';
import { stepGlyphs } from './marks/glyphs';
import { Text, type Tone } from './Text';

interface TreatmentMarkProps {
  kind: StepKind;
  /** Side of the mark in pixels. Default 24. */
  size?: number;
  /** Puts the word beside the mark: the kind's own, or the words given. Leave out only where the word stands beside it already. */
  withLabel?: boolean | string;
  tone?: Tone;
}

/** Word of a kind of step. */
export const stepWord = (kind: StepKind): string => tData(`step.${kind}`, kind);

/** The mark of a kind of step, with its word. */
export function TreatmentMark({ kind, size = 24, withLabel, tone = 'ink' }: TreatmentMarkProps) {
  const mark = <GlyphMark glyph={stepGlyphs[kind]} size={size} stroke={`var(--${tone})`} />;
  if (!withLabel) return mark;
  return (
    <View style={{ flexDirection: 'row', alignItems: 'center', gap: 8 }}>
      {mark}
      <Text strong tone={tone} style={{ flexShrink: 1 }}>
        {withLabel === true ? stepWord(kind) : withLabel}
      </Text>
    </View>
  );
}
