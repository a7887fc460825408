import { router, useLocalSearchParams } from 'expo-router';
import { useState } from 'react';

import { useMe } from '@/hooks/useMe';
import { useCreateProtocol, useLibraryProtocol } from '@/hooks/useProtocols';
import type { ProtocolBody } from '@/protocols/types';
import { fieldError } from '@/lib/api';
import { t } from '@/shared/messages';
import { Button } from '../ui/Button';
import { Dialog } from '../ui/Dialog';
import { Field } from '../ui/Field';
import { Notice } from '../ui/Notice';
import { Screen } from '../ui/Screen';
import { failureWords, Loaded } from '../ui/states';
import { Text } from '../ui/Text';
import { Bench } from './Bench';

/** A published protocol, to read and to copy. */
export function LibraryProtocolScreen() {
  const { id } = useLocalSearchParams<'/protocols/library/[id]'>();
  const query = useLibraryProtocol(id);
  const practice = useMe().data?.organisations.find((organisation) => organisation.abilities.includes('protocol.edit'));
  const [copying, setCopying] = useState(false);
  return (
    <Screen
      title={query.data?.name ?? t('protocols.library')}
      kicker={t('protocols.library')}
      {...(query.data ? { subtitle: query.data.summary } : {})}
      back={{ href: '/protocols', label: t('protocols.title') }}
      width="full"
      toolbar={
        practice && query.data ? (
          <Button
            kind="primary"
            label={t('protocols.copy', { organisation: practice.name })}
            onPress={() => setCopying(true)}
          />
        ) : null
      }
    >
      <Loaded query={query}>{(data) => <Bench body={data.body as ProtocolBody} findings={data.findings} />}</Loaded>
      {copying && practice && query.data ? (
        <CopyDialog libraryId={id} organisation={practice} name={query.data.name} onClose={() => setCopying(false)} />
      ) : null}
    </Screen>
  );
}

interface CopyProps {
  libraryId: string;
  organisation: { id: string; name: string };
  name: string;
  onClose: () => void;
}

function CopyDialog({ libraryId, organisation, name: first, onClose }: CopyProps) {
  const [name, setName] = useState(first);
  const create = useCreateProtocol();
  const copy = () =>
    create.mutate(
      { organisationId: organisation.id, name: name.trim(), libraryId },
      {
        onSuccess: (made) =>
          made.workingCopy && router.push({ pathname: '/protocols/version/[id]', params: { id: made.workingCopy.id } }),
      },
    );
  return (
    <Dialog
      open
      onClose={onClose}
      title={t('protocols.copy', { organisation: organisation.name })}
      actions={
        <>
          <Button label={t('protocols.copyNow')} onPress={copy} busy={create.isPending} disabled={name.trim() === ''} />
          <Button label={t('ui.cancel')} kind="quiet" onPress={onClose} />
        </>
      }
    >
      <Field label={t('protocols.copyName')} value={name} onChange={setName} error={fieldError(create.error, 'name')} />
      <Text tone="quiet">{t('protocols.copyHint')}</Text>
      {create.error ? <Notice tone="stop">{failureWords(create.error)}</Notice> : null}
    </Dialog>
  );
}
