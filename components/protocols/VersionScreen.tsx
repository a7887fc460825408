import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';

import { useMe } from '@/hooks/useMe';
import { useProtocol, useVersion } from '@/hooks/useProtocols';
import { ApiFailure } from '@/lib/api';
import type { VersionDetail } from '@/shared/contracts/protocols';
import { t } from '@/shared/messages';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { LinkButton } from '../ui/Link';
import { Notice } from '../ui/Notice';
import { Screen } from '../ui/Screen';
import { failureWords, Loaded, Loading } from '../ui/states';
import { Bench } from './Bench';
import type { Part } from './BenchEdit';
import { addStep } from './edit/edit';
import { PartDialog } from './PartDialog';
import { useBench } from './useBench';
import { VersionActions } from './VersionActions';
import { versionWords } from './versionWords';

/** The protocol bench: opens in reading mode; editing a working copy is explicit. */
export function VersionScreen() {
  const { id } = useLocalSearchParams<'/protocols/version/[id]'>();
  const query = useVersion(id);
  if (!query.data)
    return (
      <Screen title={t('protocols.title')} back={{ href: '/protocols', label: t('protocols.title') }}>
        <Loaded query={query}>{() => <Loading />}</Loaded>
      </Screen>
    );
  return <Version key={id} version={query.data} />;
}

function Version({ version }: { version: VersionDetail }) {
  const bench = useBench(version);
  const protocol = useProtocol(version.protocolId).data;
  const me = useMe().data;
  const [editing, setEditing] = useState(bench.touched);
  const [part, setPart] = useState<Part | null>(null);
  const mayPlan =
    me?.properties.some((property) => property.abilities.includes('cohort.plan')) && version.state === 'signedOff';
  const edit = {
    change: bench.change,
    open: setPart,
    addStep: (visit: string) =>
      bench.change((before) => {
        const made = addStep(before, visit, 'other');
        setPart({ what: 'step', id: made.id });
        return made.body;
      }),
  };
  return (
    <Screen
      title={bench.body.name || t('protocols.newName')}
      kicker={[protocol?.organisation, versionWords(version)].filter(Boolean).join(' · ')}
      subtitle={bench.body.summary}
      back={{ href: '/protocols', label: t('protocols.title') }}
      width="full"
      toolbar={
        <>
          {mayPlan ? <LinkButton href="/cohorts/new" label={t('protocols.start')} /> : null}
          <VersionActions version={version} protocol={protocol} bench={bench} editing={editing} onEdit={setEditing} />
        </>
      }
    >
      <View style={{ gap: space.m }}>
        <SaveState bench={bench} />
        <Bench body={bench.body} findings={bench.findings} {...(editing ? { edit } : {})} />
      </View>
      {part ? <PartDialog part={part} body={bench.body} change={bench.change} onClose={() => setPart(null)} /> : null}
    </Screen>
  );
}

/** What is not at the server yet, and what to do when somebody else saved meanwhile. */
function SaveState({ bench }: { bench: ReturnType<typeof useBench> }) {
  const { error } = bench;
  if (error instanceof ApiFailure && error.id === 'stale')
    return (
      <Notice
        tone="warn"
        action={
          <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.s }}>
            <Button label={t('protocols.staleReload')} onPress={bench.forget} />
            <Button label={t('protocols.staleKeep')} onPress={() => bench.save(true)} busy={bench.saving} />
          </View>
        }
      >
        {error.message}
      </Notice>
    );
  if (error) return <Notice tone="stop">{failureWords(error)}</Notice>;
  return bench.touched ? <Notice>{t('protocols.unsaved')}</Notice> : null;
}
