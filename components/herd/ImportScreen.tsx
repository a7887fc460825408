import { useState } from 'react';
import { View } from 'react-native';

import { useImport, useImportPreview } from '@/hooks/useHerd';
import { useOneProperty } from '@/hooks/usePlace';
import { newId } from '@/lib/ids';
import type { ImportRequest } from '@/shared/contracts/herd';
import { t } from '@/shared/messages';
import { space } from '../theme/tokens';
import { FieldFrame } from '../ui/FieldFrame';
import { Notice } from '../ui/Notice';
import { Screen } from '../ui/Screen';
import { Select } from '../ui/Select';
import { EmptyState, failureWords, Loading } from '../ui/states';
import { Text } from '../ui/Text';
import { ImportResult } from './ImportResult';
import { ImportReview } from './ImportReview';
import { readBase64 } from './readFile';

const mostBytes = 4 * 1024 * 1024;

/** Brings animals in from a CSV file: nothing is written until every row has been seen. */
export function ImportScreen() {
  const { property, properties, choose } = useOneProperty('herd.import');
  const propertyId = property?.id ?? '';
  const preview = useImportPreview(propertyId);
  const commit = useImport(propertyId);
  const [request, setRequest] = useState<ImportRequest | null>(null);
  const [tooLarge, setTooLarge] = useState(false);
  const look = (next: ImportRequest) => {
    setRequest(next);
    preview.mutate(next);
  };
  const take = async (file: File | undefined) => {
    if (!file) return;
    commit.reset();
    setTooLarge(file.size > mostBytes);
    if (file.size > mostBytes) return;
    look({ id: newId(), fileName: file.name, contentBase64: await readBase64(file) });
  };
  const error = tooLarge
    ? t('import.tooLarge')
    : preview.error
      ? (fieldWords(preview.error) ?? failureWords(preview.error))
      : undefined;
  return (
    <Screen
      title={t('import.title')}
      {...(property ? { kicker: property.name } : {})}
      back={{ href: '/herd', label: t('herd.title') }}
      width="full"
    >
      {property ? (
        <View style={{ gap: space.l }}>
          {properties.length > 1 ? (
            <Select
              label={t('planner.property')}
              value={property.id}
              onChange={choose}
              options={properties.map((one) => ({ value: one.id, label: one.name }))}
            />
          ) : null}
          <FieldFrame
            label={request ? t('import.another') : t('import.choose')}
            hint={t('import.chooseHint')}
            error={error}
          >
            {(control) => (
              <input
                {...control}
                className="control"
                type="file"
                accept=".csv,.txt,.tsv,text/csv,text/plain"
                onChange={(event) => void take(event.target.files?.[0])}
              />
            )}
          </FieldFrame>
          {preview.isPending && !preview.data ? <Loading label={t('import.reading')} /> : null}
          {commit.data ? (
            <ImportResult result={commit.data} />
          ) : preview.data && request ? (
            <ImportReview
              preview={preview.data}
              request={request}
              looking={preview.isPending}
              committing={commit.isPending}
              onChange={(part) => look({ ...request, ...part })}
              onCommit={() => commit.mutate(request)}
            />
          ) : null}
          {commit.error ? <Notice tone="stop">{failureWords(commit.error)}</Notice> : null}
        </View>
      ) : (
        <EmptyState title={t('herd.empty')} next={t('server.forbidden')} />
      )}
      <Text variant="small" tone="quiet">
        {t('caution.label')}
      </Text>
    </Screen>
  );
}

/** The server's sentence for the file itself, where it could not be read. */
function fieldWords(error: unknown): string | undefined {
  const fields = (error as { fields?: { message: string }[] }).fields;
  return fields?.[0]?.message;
}
