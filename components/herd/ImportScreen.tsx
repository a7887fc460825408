import { View } from 'react-native';

import { useMe } from '@/hooks/useMe';
import { useOneProperty } from '@/hooks/usePlace';
import { t } from '@/shared/messages';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { FieldFrame } from '../ui/FieldFrame';
import { Notice } from '../ui/Notice';
import { Screen } from '../ui/Screen';
import { Select } from '../ui/Select';
import { EmptyState, Loaded, Loading } from '../ui/states';
import { ImportResult } from './ImportResult';
import { ImportReview } from './ImportReview';
import { useImportFile } from './useImportFile';

/** Brings animals in from a CSV file: nothing is written until every row has been seen. */
export function ImportScreen() {
  const me = useMe();
  const { property, properties, choose } = useOneProperty('herd.import');
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
            <View style={{ maxWidth: 360 }}>
              <Select
                label={t('planner.property')}
                value={property.id}
                onChange={choose}
                options={properties.map((one) => ({ value: one.id, label: one.name }))}
              />
            </View>
          ) : null}
          {/* another property is another import: a file looked at for one is not put into the other */}
          <ImportFile key={property.id} propertyId={property.id} />
        </View>
      ) : (
        <Loaded query={me}>{() => <EmptyState title={t('herd.closed')} next={t('server.forbidden')} />}</Loaded>
      )}
    </Screen>
  );
}

function ImportFile({ propertyId }: { propertyId: string }) {
  const file = useImportFile(propertyId);
  const { request, preview, result } = file;
  if (result) return <ImportResult result={result} onAnother={file.forget} />;
  return (
    <>
      <FieldFrame
        label={request ? t('import.another') : t('import.choose')}
        hint={t('import.chooseHint')}
        error={file.fileError}
      >
        {(control) => (
          <input
            {...control}
            className="control"
            type="file"
            accept=".csv,.txt,.tsv,text/csv,text/plain"
            disabled={file.committing}
            // the same file chosen again, once corrected, is to be read again
            onClick={(event) => (event.currentTarget.value = '')}
            onChange={(event) => void file.take(event.target.files?.[0])}
          />
        )}
      </FieldFrame>
      {file.reading ? <Loading label={t('import.reading')} /> : null}
      {request && !preview && file.fileError ? <Button label={t('ui.retry')} onPress={file.lookAgain} /> : null}
      {preview && request ? (
        <ImportReview
          preview={preview}
          request={request}
          looking={file.looking}
          committing={file.committing}
          lookError={file.lookError}
          commitError={file.commitError}
          onChange={file.change}
          onLookAgain={file.lookAgain}
          onCommit={file.commit}
        />
      ) : null}
      {file.committing ? (
        <View role="status">
          <Notice tone="note" silent>
            {t('import.committing')}
          </Notice>
        </View>
      ) : null}
    </>
  );
}
