import { StyleSheet, View } from 'react-native';

import type { ProtocolBody } from '@/protocols/types';
import type { FindingView } from '@/shared/contracts/common';
import { t } from '@/shared/messages';
import { GapLine } from '../charts/GapLine';
import { useWide } from '../theme/layout';
import { space } from '../theme/tokens';
import { FindingList } from '../ui/Finding';
import { Text } from '../ui/Text';
import { About } from './About';
import type { BenchEdit } from './BenchEdit';
import { gapInto, moveStepMinutes, moveVisit } from './edit/move';
import { lineOf } from './line';
import { Sources } from './Sources';
import { StepTable } from './StepTable';

interface BenchProps {
  body: ProtocolBody;
  findings: readonly FindingView[];
  /** Set while editing. */
  edit?: BenchEdit;
}

/** The protocol bench: the gap line over the step table, findings beside. Reading unless `edit` is given. */
export function Bench({ body, findings, edit }: BenchProps) {
  const wide = useWide();
  const line = lineOf(body);
  return (
    <View style={styles.bench}>
      <View>
        <GapLine
          visits={line.visits}
          gaps={line.gaps}
          label={t('protocols.line')}
          {...(edit
            ? {
                onMove: (visit: string, minutes: number) => edit.change((before) => moveVisit(before, visit, minutes)),
                stepMinutes: (visit: string) => {
                  const gap = gapInto(body, visit);
                  return gap ? moveStepMinutes(gap) : 0;
                },
              }
            : {})}
        />
        <Text variant="small" tone="quiet">
          {edit ? t('protocols.lineEditHint') : t('protocols.lineHint')}
        </Text>
      </View>
      <View style={wide ? styles.wide : styles.phone}>
        <View style={wide ? styles.main : null}>
          <StepTable body={body} {...(edit ? { edit } : {})} />
          <About body={body} {...(edit ? { edit } : {})} />
        </View>
        <View style={wide ? styles.side : styles.phone}>
          <View>
            <Text variant="heading" level={2}>
              {t('protocols.findings')}
            </Text>
            <FindingList findings={findings} label={t('protocols.findings')} none={t('protocols.consistent')} />
          </View>
          <Sources body={body} />
        </View>
      </View>
    </View>
  );
}

const styles = StyleSheet.create({
  bench: { gap: space.l },
  wide: { flexDirection: 'row', gap: space.xl, alignItems: 'flex-start' },
  phone: { gap: space.l },
  main: { flex: 1, minWidth: 0 },
  side: { width: 360, flexShrink: 0, gap: space.l },
});
