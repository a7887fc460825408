import { StyleSheet, View } from 'react-native';

import type { FindingView } from '@/shared/contracts/common';
import { t } from '@/shared/messages';
import { color, space } from '../theme/tokens';
import { SeverityMark, type Severity } from './SeverityMark';
import { Text } from './Text';

type Shown = Pick<FindingView, 'severity' | 'message' | 'remedy'> & { source?: string | undefined };

const rank: Record<Severity, number> = { stop: 0, warn: 1, note: 2 };
const word = { stop: 'ui.stop', warn: 'ui.warn', note: 'ui.note' } as const;

/** Mark, word, sentence with its figures, then in bold what to do. */
export const FindingRow = ({ finding }: { finding: Shown }) => (
  <View role="listitem" style={styles.row}>
    <SeverityMark severity={finding.severity} />
    <View style={styles.words}>
      <Text>
        <Text strong tone={finding.severity}>
          {t(word[finding.severity])}.{' '}
        </Text>
        {finding.message}
      </Text>
      {finding.remedy ? <Text strong>{finding.remedy}</Text> : null}
      {finding.source ? (
        <Text variant="small" tone="quiet">
          {t('ui.source', { source: finding.source })}
        </Text>
      ) : null}
    </View>
  </View>
);

interface FindingListProps {
  findings: readonly FindingView[];
  /** Name of the list. Default: Findings. */
  label?: string;
  /** Said when there is nothing to say. */
  none?: string;
}

/** Stops first, then warnings, then notes. Announced when they change, without interrupting. */
export function FindingList({ findings, label, none }: FindingListProps) {
  const sorted = [...findings].sort((a, b) => rank[a.severity] - rank[b.severity]);
  return (
    <View aria-live="polite">
      {sorted.length > 0 ? (
        <View role="list" aria-label={label ?? t('ui.findings')} style={styles.list}>
          {sorted.map((finding, at) => (
            <FindingRow key={`${finding.code}-${finding.path ?? ''}-${at}`} finding={finding} />
          ))}
        </View>
      ) : none ? (
        <Text tone="quiet">{none}</Text>
      ) : null}
    </View>
  );
}

const styles = StyleSheet.create({
  list: { borderTopWidth: 1, borderTopColor: color.rail },
  row: { flexDirection: 'row', gap: space.s, paddingVertical: 12, borderBottomWidth: 1, borderBottomColor: color.rail },
  words: { flex: 1, gap: space.xs },
});
