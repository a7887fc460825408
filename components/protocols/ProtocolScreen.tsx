import { useLocalSearchParams } from 'expo-router';

import { useProtocol } from '@/hooks/useProtocols';
import { t } from '@/shared/messages';
import { RailList, RailRow } from '../ui/Rail';
import { Screen } from '../ui/Screen';
import { Loaded } from '../ui/states';
import { versionWords } from './versionWords';

/** The versions of a protocol, newest first. */
export function ProtocolScreen() {
  const { id } = useLocalSearchParams<'/protocols/[id]'>();
  const query = useProtocol(id);
  return (
    <Screen
      title={query.data?.name ?? t('protocols.title')}
      back={{ href: '/protocols', label: t('protocols.title') }}
      padded={false}
    >
      <Loaded query={query}>
        {(protocol) => (
          <RailList label={t('protocols.versions')}>
            {protocol.versions.map((version) => (
              <RailRow
                key={version.id}
                href={{ pathname: '/protocols/version/[id]', params: { id: version.id } }}
                title={t('protocols.version', { number: version.number })}
                subtitle={versionWords(version)}
              />
            ))}
          </RailList>
        )}
      </Loaded>
    </Screen>
  );
}
