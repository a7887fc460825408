import { router } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';

import { useMe } from '@/hooks/useMe';
import { useCreateProtocol, useLibrary, useProtocols } from '@/hooks/useProtocols';
import { animalClasses, type AnimalClass } from '@/protocols/types';
import type { LibrarySummary, ProtocolSummary } from '@/shared/contracts/protocols';
import { t, tData } from '@/shared/messages';
import { day } from '@/shared/when';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { RailList, RailRow } from '../ui/Rail';
import { Screen } from '../ui/Screen';
import { Select } from '../ui/Select';
import { EmptyState, Loaded } from '../ui/states';
import { Text } from '../ui/Text';

/** The practice's own protocols, then the published ones with their sources. */
export function ProtocolsScreen() {
  const me = useMe().data;
  const practice = me?.organisations.find((organisation) => organisation.abilities.includes('protocol.edit'));
  const create = useCreateProtocol();
  const own = useProtocols();
  const [animalClass, setClass] = useState<AnimalClass | 'all'>('all');
  const begin = () =>
    practice &&
    create.mutate(
      { organisationId: practice.id, name: t('protocols.newName') },
      {
        onSuccess: (made) =>
          made.workingCopy && router.push({ pathname: '/protocols/version/[id]', params: { id: made.workingCopy.id } }),
      },
    );
  return (
    <Screen
      title={t('protocols.title')}
      padded={false}
      toolbar={practice ? <Button label={t('protocols.new')} onPress={begin} busy={create.isPending} /> : null}
    >
      <View>
        <Heading title={t('protocols.own')} hint={t('protocols.ownHint')} />
        <Loaded query={own}>
          {(data) =>
            data.items.length === 0 ? (
              <EmptyState
                title={t('protocols.noneTitle')}
                next={t(practice ? 'protocols.noneVet' : 'protocols.noneOther')}
              />
            ) : (
              <RailList label={t('protocols.own')}>
                {data.items.map((protocol) => (
                  <OwnRow key={protocol.id} protocol={protocol} />
                ))}
              </RailList>
            )
          }
        </Loaded>
      </View>
      <View>
        <Heading title={t('protocols.library')} hint={t('protocols.libraryHint')} />
        <View style={{ paddingHorizontal: space.m, paddingBottom: space.m, maxWidth: 360 }}>
          <Select
            label={t('protocols.filterClass')}
            value={animalClass}
            onChange={setClass}
            options={[
              { value: 'all', label: t('protocols.allClasses') },
              ...animalClasses.map((value) => ({ value, label: tData(`class.${value}`, value) })),
            ]}
          />
        </View>
        <Library animalClass={animalClass} />
      </View>
    </Screen>
  );
}

const Heading = ({ title, hint }: { title: string; hint: string }) => (
  <View style={{ paddingHorizontal: space.m, paddingVertical: space.s }}>
    <Text variant="heading" level={2}>
      {title}
    </Text>
    <Text variant="small" tone="quiet">
      {hint}
    </Text>
  </View>
);

function Library({ animalClass }: { animalClass: AnimalClass | 'all' }) {
  const query = useLibrary();
  return (
    <Loaded query={query}>
      {(data) => (
        <RailList label={t('protocols.library')}>
          {data.items
            .filter((entry) => animalClass === 'all' || entry.classes.includes(animalClass))
            .map((entry) => (
              <LibraryRow key={entry.id} entry={entry} />
            ))}
        </RailList>
      )}
    </Loaded>
  );
}

const LibraryRow = ({ entry }: { entry: LibrarySummary }) => (
  <RailRow
    href={{ pathname: '/protocols/library/[id]', params: { id: entry.id } }}
    title={entry.name}
    subtitle={[
      entry.serviceInterval,
      t('protocols.yardings', { count: entry.yardings }),
      t('protocols.lengthDays', { count: entry.lengthDays }),
      t('protocols.sources', { count: entry.sources }),
      entry.fromMemory ? t('protocols.fromMemory') : null,
    ]
      .filter(Boolean)
      .join(' · ')}
    trailing={
      <Text variant="small" tone="quiet" align="right">
        {entry.classes.map((c) => tData(`class.${c}`, c)).join('\n')}
      </Text>
    }
  />
);

function OwnRow({ protocol }: { protocol: ProtocolSummary }) {
  const { current, workingCopy } = protocol;
  const open = current ?? workingCopy;
  const state = current
    ? `${t('protocols.version', { number: current.number })}, ${t('protocols.signedOffBy', { name: current.signedBy ?? '', day: day(Date.parse(current.signedAt ?? ''), 'UTC', undefined, true) })}`
    : t('protocols.workingCopyFirst');
  return (
    <RailRow
      {...(open ? { href: { pathname: '/protocols/version/[id]' as const, params: { id: open.id } } } : {})}
      title={protocol.name}
      subtitle={`${protocol.organisation} · ${state}`}
      trailing={
        <Text variant="small" tone="quiet" align="right">
          {protocol.classes.map((c) => tData(`class.${c}`, c)).join('\n')}
        </Text>
      }
    >
      {current && workingCopy ? (
        <Button
          kind="quiet"
          label={t('protocols.openWorkingCopy')}
          onPress={() => router.push({ pathname: '/protocols/version/[id]', params: { id: workingCopy.id } })}
        />
      ) : null}
    </RailRow>
  );
}
