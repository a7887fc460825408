import { router } from 'expo-router';
import { useState } from 'react';

import { useSignOff, useVersionActions } from '@/hooks/useProtocols';
import { ApiFailure } from '@/lib/api';
import type { ProtocolBody } from '@/protocols/types';
import type { VersionDetail } from '@/shared/contracts/protocols';
import type { Output } from '@/shared/routes';
import { t } from '@/shared/messages';
import { Button } from '../ui/Button';
import { Confirm, Dialog } from '../ui/Dialog';
import { FindingList } from '../ui/Finding';
import { Notice } from '../ui/Notice';
import { failureWords } from '../ui/states';
import { Text } from '../ui/Text';
import type { useBench } from './useBench';

interface ActionsProps {
  version: VersionDetail;
  protocol: Output<'GET /api/protocols/:protocolId'> | undefined;
  bench: ReturnType<typeof useBench>;
  editing: boolean;
  onEdit: (editing: boolean) => void;
}

/** What can be done with this version: edit, save, sign off; or open the next working copy. */
export function VersionActions(props: ActionsProps) {
  const { version } = props;
  if (version.state === 'workingCopy') return version.canEdit ? <WorkingCopy {...props} /> : null;
  return props.protocol?.canEdit ? <SignedOff version={version} protocol={props.protocol} /> : null;
}

function WorkingCopy({ version, bench, editing, onEdit }: ActionsProps) {
  const [asking, setAsking] = useState<'signOff' | 'discard' | null>(null);
  const { discard } = useVersionActions(version.id, version.protocolId);
  return (
    <>
      {editing ? (
        <>
          <Button label={t('protocols.undo')} kind="quiet" onPress={bench.undo} disabled={!bench.canUndo} />
          <Button
            label={t('protocols.save')}
            kind={bench.touched ? 'primary' : 'plain'}
            onPress={() => bench.save()}
            busy={bench.saving}
            disabled={!bench.touched}
          />
          <Button label={t('protocols.stopEditing')} onPress={() => onEdit(false)} />
        </>
      ) : (
        <>
          <Button label={t('protocols.discard')} kind="quiet" onPress={() => setAsking('discard')} />
          <Button label={t('protocols.edit')} onPress={() => onEdit(true)} />
          <Button
            kind="primary"
            label={t('protocols.signOff')}
            disabled={bench.touched || !version.canSignOff}
            why={bench.touched ? t('protocols.signOffSave') : undefined}
            onPress={() => setAsking('signOff')}
          />
        </>
      )}
      {asking === 'signOff' ? <SignOffDialog version={version} onClose={() => setAsking(null)} /> : null}
      <Confirm
        open={asking === 'discard'}
        danger
        title={t('protocols.discard')}
        body={t('protocols.discardAsk')}
        confirmLabel={t('protocols.discard')}
        busy={discard.isPending}
        error={discard.error ? failureWords(discard.error) : undefined}
        onClose={() => setAsking(null)}
        onConfirm={() =>
          discard.mutate(undefined, {
            onSuccess: () => {
              bench.forget();
              router.replace('/protocols');
            },
          })
        }
      />
    </>
  );
}

/** Signing off is a signature: it says what it means, and a stop stands in its way with words. */
function SignOffDialog({ version, onClose }: { version: VersionDetail; onClose: () => void }) {
  const sign = useSignOff(version.id);
  const name = (version.body as ProtocolBody).name;
  const findings = sign.error instanceof ApiFailure ? sign.error.findings : [];
  return (
    <Dialog
      open
      onClose={onClose}
      title={`${t('protocols.signOff')}: ${name}`}
      actions={
        <>
          <Button
            label={t('protocols.signOffConfirm')}
            busy={sign.isPending}
            onPress={() => sign.mutate(version.revision, { onSuccess: onClose })}
          />
          <Button label={t('ui.cancel')} kind="quiet" onPress={onClose} />
        </>
      }
    >
      <Text>{t('protocols.signOffAsk', { number: version.number })}</Text>
      <Text tone="quiet">{t('protocols.confirmDoses')}</Text>
      {sign.error ? <Notice tone="stop">{failureWords(sign.error)}</Notice> : null}
      <FindingList findings={findings} />
    </Dialog>
  );
}

function SignedOff({ version, protocol }: { version: VersionDetail; protocol: NonNullable<ActionsProps['protocol']> }) {
  const [retiring, setRetiring] = useState(false);
  const { openNext, retire } = useVersionActions(version.id, version.protocolId);
  const open = (id: string) => router.push({ pathname: '/protocols/version/[id]', params: { id } });
  const { workingCopy } = protocol;
  return (
    <>
      {version.state === 'signedOff' ? (
        <Button label={t('protocols.retire')} kind="quiet" onPress={() => setRetiring(true)} />
      ) : null}
      {workingCopy ? (
        <Button label={t('protocols.openWorkingCopy')} onPress={() => open(workingCopy.id)} />
      ) : (
        <Button
          label={t('protocols.next')}
          busy={openNext.isPending}
          onPress={() => openNext.mutate(undefined, { onSuccess: (made) => open(made.id) })}
        />
      )}
      <Confirm
        open={retiring}
        title={t('protocols.retire')}
        body={t('protocols.retireAsk', { number: version.number })}
        confirmLabel={t('protocols.retire')}
        busy={retire.isPending}
        error={retire.error ? failureWords(retire.error) : undefined}
        onClose={() => setRetiring(false)}
        onConfirm={() => retire.mutate(undefined, { onSuccess: () => setRetiring(false) })}
      />
    </>
  );
}
