import { StyleSheet, View } from 'react-native';

import { animalClasses } from '@/protocols/types';
import type { ImportPreview, ImportRequest } from '@/shared/contracts/herd';
import { t, tData } from '@/shared/messages';
import { color, space } from '../theme/tokens';
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
  /** Why the last change could not be looked at; the rows shown are those before it. */
  lookError: string | undefined;
  commitError: string | undefined;
  onChange: (part: Partial<ImportRequest>) => void;
  onLookAgain: () => void;
  onCommit: () => void;
}

const delimiterWords = (delimiter: string): string => {
  const words = { ',': t('import.comma'), ';': t('import.semicolon'), '\t': t('import.tab') };
  return words[delimiter as keyof typeof words] ?? delimiter;
};

/** What the import would do: questions first, then counts, columns and every row. */
export function ImportReview(props: ReviewProps) {
  const { preview, request, looking, lookError, onChange, onLookAgain } = props;
  const { counts, questions } = preview;
  return (
    <View style={styles.review}>
      <Text tone="quiet">
        {t('import.file', {
          name: preview.fileName,
          encoding: preview.encoding,
          delimiter: delimiterWords(preview.delimiter),
        })}
      </Text>
      {questions.length > 0 || request.dateOrder || request.defaultClass ? (
        <Questions preview={preview} request={request} onChange={onChange} />
      ) : null}
      <View style={styles.counts}>
        {(['create', 'update', 'skip', 'refuse'] as const).map((key) => (
          <View key={key} style={styles.count}>
            <Text variant="bigFigure" tone={key === 'refuse' && counts.refuse > 0 ? 'stop' : 'ink'}>
              {counts[key]}
            </Text>
            <Text variant="small" tone="quiet">
              {t(`import.${key}`)}
            </Text>
          </View>
        ))}
      </View>
      <View role="status">{looking ? <Text tone="quiet">{t('import.lookingAgain')}</Text> : null}</View>
      {lookError ? (
        <Notice tone="stop" action={<Button label={t('ui.retry')} onPress={onLookAgain} />}>
          {lookError}
        </Notice>
      ) : null}
      <Commit {...props} />
      <ImportColumns preview={preview} request={request} onChange={(mapping) => onChange({ mapping })} />
      <ImportRows rows={preview.rows} />
    </View>
  );
}

function Commit({ preview, looking, committing, lookError, commitError, onCommit }: ReviewProps) {
  const { counts, questions } = preview;
  const changes = counts.create + counts.update;
  const why = questions.length > 0 ? t('import.notYet') : changes === 0 ? t('import.nothing') : undefined;
  return (
    <View style={styles.commit}>
      {counts.refuse > 0 ? <Text>{t('import.commitRefused', { count: counts.refuse })}</Text> : null}
      <Button
        kind="primary"
        size={64}
        label={t('import.commit', { count: changes })}
        disabled={why !== undefined || looking || lookError !== undefined}
        busy={committing}
        why={why}
        onPress={onCommit}
      />
      {commitError ? <Notice tone="stop">{commitError}</Notice> : null}
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
  commit: { gap: space.s },
});
