import { StyleSheet, View } from 'react-native';

import type { Gap, ProtocolBody, Step, Visit } from '@/protocols/types';
import { t } from '@/shared/messages';
import { useWide } from '../theme/layout';
import { color, font, space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { Text } from '../ui/Text';
import { TreatmentMark } from '../ui/TreatmentMark';
import type { BenchEdit } from './BenchEdit';
import { boundWords, conditionWords, gapWords, itemWords, stepName } from './edit/words';

interface TableProps {
  body: ProtocolBody;
  edit?: BenchEdit;
}

/** Every step, visit by visit, with the gaps that lead to it. A table on a wide page, a list on a phone. */
export function StepTable({ body, edit }: TableProps) {
  const wide = useWide();
  return wide ? (
    <WideTable body={body} {...(edit ? { edit } : {})} />
  ) : (
    <PhoneList body={body} {...(edit ? { edit } : {})} />
  );
}

const gapsTo = (body: ProtocolBody, step: Step): Gap[] => body.gaps.filter((gap) => gap.to === step.id);
const nameOf = (body: ProtocolBody, id: string): string => {
  const step = body.steps.find((s) => s.id === id);
  return step ? stepName(step) : id;
};

function marks(body: ProtocolBody, step: Step): string[] {
  return [
    step.id === body.timingAnchor ? t('protocols.anchor') : '',
    step.id === body.serviceStep ? t('protocols.service') : '',
  ].filter(Boolean);
}

function StepWords({ body, step }: { body: ProtocolBody; step: Step }) {
  const extra = [step.sourceLabel, ...marks(body, step)].filter(Boolean);
  return (
    <View style={styles.step}>
      <TreatmentMark kind={step.kind} size={26} />
      <View style={styles.grow}>
        <Text strong>{stepName(step)}</Text>
        {step.items.map((item, i) => (
          <Text key={i} variant="small" tone="quiet">
            {itemWords(item)}
          </Text>
        ))}
        {extra.length > 0 ? (
          <Text variant="small" tone="quiet">
            {extra.join(' · ')}
          </Text>
        ) : null}
        {step.note ? <Text variant="small">{step.note}</Text> : null}
      </View>
    </View>
  );
}

function WideTable({ body, edit }: TableProps) {
  return (
    <table className="table">
      <caption className="hidden-words">{t('protocols.line')}</caption>
      <thead>
        <tr>
          {(['visit', 'step', 'from', 'least', 'ideal', 'most', 'who'] as const).map((key) => (
            <th key={key} scope="col">
              {t(`protocols.${key}`)}
            </th>
          ))}
          {edit ? <th scope="col">{t('protocols.edit')}</th> : null}
        </tr>
      </thead>
      <tbody>
        {body.visits.flatMap((visit, n) =>
          body.steps
            .filter((step) => step.visit === visit.id)
            .map((step, i) => (
              <tr key={step.id}>
                <td>{i === 0 ? <VisitCell visit={visit} n={n} {...(edit ? { edit } : {})} /> : null}</td>
                <td>
                  <StepWords body={body} step={step} />
                </td>
                <GapCells body={body} step={step} />
                <td>
                  <Text variant="small">{conditionWords(step.when, body)}</Text>
                </td>
                {edit ? (
                  <td>
                    <StepActions body={body} step={step} edit={edit} />
                  </td>
                ) : null}
              </tr>
            )),
        )}
      </tbody>
    </table>
  );
}

function VisitCell({ visit, n, edit }: { visit: Visit; n: number; edit?: BenchEdit }) {
  return (
    <View>
      <Text variant="figure">{n + 1}</Text>
      <Text variant="small" tone="quiet">
        {visit.label}
      </Text>
      {edit ? (
        <View>
          <Button
            kind="quiet"
            label={t('protocols.editVisit')}
            accessibleLabel={`${t('protocols.editVisit')}: ${visit.label}`}
            onPress={() => edit.open({ what: 'visit', id: visit.id })}
          />
          <Button
            kind="quiet"
            label={t('protocols.addStepShort')}
            accessibleLabel={`${t('protocols.addStep')}: ${visit.label}`}
            onPress={() => edit.addStep(visit.id)}
          />
        </View>
      ) : null}
    </View>
  );
}

function GapCells({ body, step }: { body: ProtocolBody; step: Step }) {
  const gaps = gapsTo(body, step);
  const column = (text: (gap: Gap) => string, figure: boolean) => (
    <td>
      {gaps.map((gap) => (
        <Text key={gap.id} {...(figure ? { style: styles.figure } : { variant: 'small', tone: 'quiet' })}>
          {text(gap)}
        </Text>
      ))}
    </td>
  );
  return (
    <>
      {column(
        (gap) => [nameOf(body, gap.from), gap.when ? conditionWords(gap.when, body) : ''].filter(Boolean).join(', '),
        false,
      )}
      {column((gap) => boundWords(gap, 'least'), true)}
      {column((gap) => boundWords(gap, 'ideal'), true)}
      {column((gap) => boundWords(gap, 'most'), true)}
    </>
  );
}

function StepActions({ body, step, edit }: { body: ProtocolBody; step: Step; edit: BenchEdit }) {
  const name = stepName(step);
  return (
    <View style={styles.actions}>
      <Button
        kind="quiet"
        label={t('protocols.editStep')}
        accessibleLabel={`${t('protocols.editStep')}: ${name}`}
        onPress={() => edit.open({ what: 'step', id: step.id })}
      />
      {gapsTo(body, step).map((gap) => (
        <Button
          key={gap.id}
          kind="quiet"
          label={t('protocols.editGap')}
          accessibleLabel={`${t('protocols.editGap')}: ${nameOf(body, gap.from)} ${t('protocols.to')} ${name}`}
          onPress={() => edit.open({ what: 'gap', id: gap.id })}
        />
      ))}
    </View>
  );
}

function PhoneList({ body, edit }: TableProps) {
  return (
    <View style={styles.list}>
      {body.visits.map((visit, n) => (
        <View key={visit.id} style={styles.visit}>
          <Text variant="heading" level={2}>{`${n + 1} · ${visit.label}`}</Text>
          {edit ? (
            <View style={styles.row}>
              <Button
                kind="quiet"
                label={t('protocols.editVisit')}
                accessibleLabel={`${t('protocols.editVisit')}: ${visit.label}`}
                onPress={() => edit.open({ what: 'visit', id: visit.id })}
              />
              <Button
                kind="quiet"
                label={t('protocols.addStepShort')}
                accessibleLabel={`${t('protocols.addStep')}: ${visit.label}`}
                onPress={() => edit.addStep(visit.id)}
              />
            </View>
          ) : null}
          {body.steps
            .filter((step) => step.visit === visit.id)
            .map((step) => (
              <View key={step.id} style={styles.item}>
                <StepWords body={body} step={step} />
                {gapsTo(body, step).map((gap) => (
                  <Text key={gap.id} variant="small">
                    {`${nameOf(body, gap.from)}: ${gapWords(gap)}`}
                  </Text>
                ))}
                {step.when ? (
                  <Text variant="small">{`${t('protocols.who')}: ${conditionWords(step.when, body)}`}</Text>
                ) : null}
                {edit ? <StepActions body={body} step={step} edit={edit} /> : null}
              </View>
            ))}
        </View>
      ))}
    </View>
  );
}

const styles = StyleSheet.create({
  step: { flexDirection: 'row', gap: space.s, alignItems: 'flex-start' },
  grow: { flexShrink: 1, minWidth: 0 },
  figure: { fontFamily: font.figure, fontWeight: '600', fontSize: 18, lineHeight: 24, whiteSpace: 'nowrap' } as object,
  actions: { flexDirection: 'column' },
  list: { gap: space.l },
  visit: { borderTopWidth: 3, borderTopColor: color.ink, paddingTop: space.s },
  row: { flexDirection: 'row', flexWrap: 'wrap' },
  item: { paddingVertical: 10, borderBottomWidth: 1, borderBottomColor: color.rail, gap: 4 },
});
