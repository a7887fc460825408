import { StyleSheet, View } from 'react-native';

import { animalClasses } from '@/protocols/types';
import type { ImportPreview, ImportRequest } from '@/shared/contracts/herd';
import { t, tData } from '@/shared/messages';
import { color, font, space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { Notice } from '../ui/Notice';
import { RadioGroup } from '../ui/RadioGroup';
import { Select } from '../ui/Select';
import { Text } from '../ui/Text';
import { ImportColumns } from './ImportColumns';
import { ImportRows } from './ImportRows';

interface ReviewProps {
  preview: ImportPreview;
  request: ImportRequest;
  looking: boolean;
  committing: boolean;
  onChange: (part: Partial<ImportRequest>) => void;
  onCommit: () => void;
}

const delimiterWords: Record<string, string> = {
  ',': t('import.comma'),
  ';': t('import.semicolon'),
  '\t': t('import.tab'),
};

/** What the import would do: questions first, then counts, columns and every row. */
export function ImportReview({ preview, request, looking, committing, onChange, onCommit }: ReviewProps) {
  const { counts, questions } = preview;
  const changes = counts.create + counts.update;
  const ready = questions.length === 0 && changes > 0 && !looking;
  return (
    <View style={styles.review}>
      <Text tone="quiet">
        {t('import.file', {
          name: preview.fileName,
          encoding: preview.encoding,
          delimiter: delimiterWords[preview.delimiter] ?? preview.delimiter,
        })}
      </Text>
      {questions.length > 0 || request.dateOrder || request.defaultClass ? (
        <Questions preview={preview} request={request} onChange={onChange} />
      ) : null}
      <View style={styles.counts}>
        {(['create', 'update', 'skip', 'refuse'] as const).map((key) => (
          <View key={key} style={styles.count}>
            <Text style={styles.figure} tone={key === 'refuse' && counts.refuse > 0 ? 'stop' : 'ink'}>
              {counts[key]}
            </Text>
            <Text variant="small" tone="quiet">
              {t(`import.${key}`)}
            </Text>
          </View>
        ))}
      </View>
      {counts.refuse > 0 ? <Text>{t('import.commitRefused', { count: counts.refuse })}</Text> : null}
      <Button
        kind="primary"
        size={64}
        label={t('import.commit', { count: changes })}
        disabled={!ready}
        busy={committing}
        why={questions.length > 0 ? t('import.questions') : changes === 0 ? t('import.nothing') : undefined}
        onPress={onCommit}
      />
      <ImportColumns preview={preview} onChange={(mapping) => onChange({ mapping })} />
      <ImportRows rows={preview.rows} />
    </View>
  );
}

function Questions({ preview, request, onChange }: Pick<ReviewProps, 'preview' | 'request' | 'onChange'>) {
  const asks = (kind: string) => preview.questions.find((question) => question.kind === kind);
  const [dates, column, group] = [asks('dateOrder'), asks('missingColumn'), asks('defaultClass')];
  return (
    <View style={styles.questions}>
      <Text variant="heading" level={2}>
        {t('import.questions')}
      </Text>
      {dates || request.dateOrder ? (
        <RadioGroup
          label={t('import.dateOrder')}
          {...(dates ? { hint: dates.message } : {})}
          value={request.dateOrder ?? ''}
          onChange={(dateOrder) => onChange({ dateOrder })}
          options={(['dmy', 'mdy', 'ymd'] as const).map((value) => ({ value, label: t(`import.dateOrder.${value}`) }))}
        />
      ) : null}
      {group || request.defaultClass ? (
        <Select
          label={t('import.defaultClass')}
          hint={group?.message}
          value={request.defaultClass ?? ''}
          placeholder=""
          onChange={(defaultClass) => onChange({ defaultClass })}
          options={animalClasses.map((value) => ({ value, label: tData(`class.${value}`, value) }))}
        />
      ) : null}
      {column ? <Notice tone="warn">{column.message}</Notice> : null}
    </View>
  );
}

const styles = StyleSheet.create({
  review: { gap: space.l },
  questions: { gap: space.m, borderLeftWidth: 8, borderLeftColor: color.warn, paddingLeft: space.m },
  counts: { flexDirection: 'row', flexWrap: 'wrap', borderBottomWidth: 3, borderBottomColor: color.ink },
  count: { flexGrow: 1, flexBasis: 130, paddingVertical: space.s },
  figure: { fontFamily: font.figureBold, fontWeight: '700', fontSize: 42, lineHeight: 46 },
});
