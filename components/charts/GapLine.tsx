import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import type { StepKind } from '@/protocols/types';
import { t } from '@/shared/messages';
import { color, font } from '../theme/tokens';
import { Text } from '../ui/Text';
import { TreatmentMark } from '../ui/TreatmentMark';
import { GapLineDrawing } from './GapLineDrawing';
import { layoutGapLine, type GapLineLayout, type LineGap, type LineVisit, type PlacedVisit } from './gapLineLayout';
import { useElementWidth } from './useElementWidth';
import { VisitHandle } from './VisitHandle';

export interface GapLineVisit extends LineVisit {
  /** Kind of every line's step, for its mark; parallel to `lines`. */
  kinds: StepKind[];
}

export interface GapLineProps {
  visits: GapLineVisit[];
  gaps: LineGap[];
  /** Name of the picture for screen readers. */
  label: string;
  /** When set, visits can be moved by key or by dragging; minutes are from where the visit stands. */
  onMove?: (visit: string, minutes: number) => void;
  /** Least that a visit moves by, in minutes; 0: it can't be moved. */
  stepMinutes?: (visit: string) => number;
}

/** Below this width flags carry only their number; the table under the line says the rest. */
const compactBelow = 560;

/** The protocol drawn to scale along one line: visits as flags, gaps as brackets, windows as thick parts. */
export function GapLine({ visits, gaps, label, onMove, stepMinutes }: GapLineProps) {
  const [ref, width] = useElementWidth(800);
  const [chosen, setChosen] = useState<string | null>(null);
  const compact = width < compactBelow;
  const shown: LineVisit[] = compact
    ? visits.map((visit, i) => ({ ...visit, label: String(i + 1), lines: [] }))
    : visits;
  const layout = layoutGapLine(shown, compact ? gaps.map((gap) => ({ ...gap, label: gap.short })) : gaps, width);
  const kindsOf = new Map(visits.map((visit) => [visit.id, visit.kinds]));
  const perPixel = Math.max(...visits.map((visit) => visit.latest), 1440) / (width - 40);
  return (
    <View ref={ref} role="group" aria-label={label} style={{ height: layout.above + layout.below, width: '100%' }}>
      <GapLineDrawing layout={layout} chosen={chosen} />
      {layout.visits.map((visit, i) => (
        <Flag
          key={visit.id}
          lineWidth={width}
          visit={visit}
          top={layout.above - visit.lift}
          number={i + 1}
          compact={compact}
          kinds={kindsOf.get(visit.id) ?? []}
        />
      ))}
      <Days layout={layout} compact={compact} />
      <GapWords layout={layout} compact={compact} />
      {onMove
        ? layout.visits.map((visit) => (
            <VisitHandle
              key={visit.id}
              visit={visit}
              top={layout.above - 24}
              step={stepMinutes?.(visit.id) ?? 0}
              perPixel={perPixel}
              onFocus={setChosen}
              onMove={(minutes) => onMove(visit.id, minutes)}
            />
          ))
        : null}
    </View>
  );
}

interface WordsProps {
  layout: GapLineLayout;
  compact: boolean;
}

const Days = ({ layout, compact }: WordsProps) => (
  <>
    {layout.days
      .filter((day) => day.labelled)
      .map((day) => (
        <Text
          key={day.day}
          variant="small"
          tone="quiet"
          align="center"
          style={[styles.day, { left: day.x - 30, top: layout.above + 12 }]}
        >
          {compact ? day.day : t('protocols.day', { day: day.day })}
        </Text>
      ))}
  </>
);

const GapWords = ({ layout, compact }: WordsProps) => (
  <>
    {layout.gaps.map((gap) =>
      compact && !gap.fits ? null : (
        <Text
          key={gap.id}
          align="center"
          style={[styles.gap, { left: gap.textX - 200, top: layout.above + 40 + gap.row * 34 }]}
        >
          <Text style={styles.gapWords}>{` ${gap.label} `}</Text>
        </Text>
      ),
    )}
  </>
);

interface FlagProps {
  lineWidth: number;
  visit: PlacedVisit;
  top: number;
  number: number;
  compact: boolean;
  kinds: StepKind[];
}

function Flag({ lineWidth, visit, top, number, compact, kinds }: FlagProps) {
  if (compact)
    return (
      <Text variant="figure" align="center" style={[styles.number, { left: visit.x - 16, top: top - 12 }]}>
        {number}
      </Text>
    );
  return (
    <View
      style={[
        styles.flag,
        visit.flipped ? { right: lineWidth - visit.x + 8, top, alignItems: 'flex-end' } : { left: visit.x + 8, top },
      ]}
    >
      <Text variant="small" tone="quiet">
        {visit.label}
      </Text>
      {visit.lines.map((line, i) => (
        <View key={line.key} style={styles.line}>
          <TreatmentMark kind={kinds[i] ?? 'other'} size={20} />
          <Text style={styles.words} numberOfLines={1}>
            {line.text}
          </Text>
        </View>
      ))}
    </View>
  );
}

const styles = StyleSheet.create({
  flag: { position: 'absolute' },
  line: { flexDirection: 'row', alignItems: 'center', gap: 8, height: 24 },
  words: { fontFamily: font.figure, fontWeight: '600', fontSize: 18, lineHeight: 24 },
  number: { position: 'absolute', width: 32 },
  day: { position: 'absolute', width: 60 },
  gap: { position: 'absolute', width: 400, pointerEvents: 'none' },
  gapWords: { fontFamily: font.figure, fontWeight: '600', fontSize: 17, lineHeight: 24, backgroundColor: color.page },
});
