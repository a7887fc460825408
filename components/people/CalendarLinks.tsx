import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { useCalendarLinkActions, useCalendarLinks } from '@/hooks/useCalendarLinks';
import { t } from '@/shared/messages';
import type { Output } from '@/shared/routes';
import { dayClock } from '@/shared/when';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { Confirm } from '../ui/Dialog';
import { RailList, RailRow } from '../ui/Rail';
import { EmptyState, failureWords, Loaded } from '../ui/states';
import { Text } from '../ui/Text';
import { toast } from '../ui/toast';
import { NewLink } from './NewLink';
import { SecretAddress } from './SecretAddress';

type CalendarLink = Output<'GET /api/calendar-links'>['items'][number];
interface Asking {
  link: CalendarLink;
  what: 'replace' | 'revoke';
}
interface Secret {
  label: string;
  url: string;
}

const when = (instant: string, zone: string) => dayClock(Date.parse(instant), zone);

function LinkRow({ link, zone, act }: { link: CalendarLink; zone: string; act: (what: 'replace' | 'revoke') => void }) {
  const read = link.lastReadAt ? t('links.read', { when: when(link.lastReadAt, zone) }) : t('links.neverRead');
  return (
    <RailRow
      title={link.label}
      subtitle={[link.property ?? t('links.all'), t('links.made', { when: when(link.createdAt, zone) }), read].join(
        ' · ',
      )}
    >
      <View style={styles.acts}>
        <Button
          label={t('links.replace')}
          accessibleLabel={t('links.replaceOf', { label: link.label })}
          onPress={() => act('replace')}
        />
        <Button
          kind="danger"
          label={t('links.revoke')}
          accessibleLabel={t('links.revokeOf', { label: link.label })}
          onPress={() => act('revoke')}
        />
      </View>
    </RailRow>
  );
}

/** What is being asked about a link, and doing it. */
function useQuestion(onSecret: (secret: Secret | null) => void) {
  const { replace, revoke } = useCalendarLinkActions();
  const [asking, setAsking] = useState<Asking | null>(null);
  const act = asking?.what === 'replace' ? replace : revoke;
  const stop = () => {
    setAsking(null);
    act.reset();
  };
  const confirm = () => {
    if (!asking) return;
    const { link, what } = asking;
    if (what === 'replace') {
      replace.mutate(link.id, {
        onSuccess: (made) => {
          onSecret(made);
          setAsking(null);
        },
      });
      return;
    }
    revoke.mutate(link.id, {
      onSuccess: () => {
        onSecret(null);
        setAsking(null);
        toast(t('links.revoked', { label: link.label }));
      },
    });
  };
  return { asking, ask: setAsking, act, stop, confirm };
}

/** Own calendar links. Times are those of the property, or of the device where there is none. */
export function CalendarLinks({ zone }: { zone: string }) {
  const links = useCalendarLinks();
  const { make } = useCalendarLinkActions();
  const [secret, setSecret] = useState<Secret | null>(null);
  const { asking, ask, act, stop, confirm } = useQuestion(setSecret);
  const what = asking?.what ?? 'revoke';
  return (
    <View style={styles.all}>
      <Text variant="heading" level={2}>
        {t('links.title')}
      </Text>
      <Text tone="quiet">{t('links.intro')}</Text>
      {secret ? <SecretAddress label={secret.label} url={secret.url} onDone={() => setSecret(null)} /> : null}
      <Loaded query={links}>
        {({ items }) =>
          items.length === 0 ? (
            <EmptyState title={t('links.none')} next={t('links.noneNext')} />
          ) : (
            <RailList label={t('links.title')}>
              {items.map((link) => (
                <LinkRow key={link.id} link={link} zone={zone} act={(chosen) => ask({ link, what: chosen })} />
              ))}
            </RailList>
          )
        }
      </Loaded>
      <NewLink make={make} onMade={setSecret} />
      <Confirm
        open={asking !== null}
        title={t(`links.${what}Title`, { label: asking?.link.label ?? '' })}
        body={t(`links.${what}Body`)}
        confirmLabel={t(`links.${what}`)}
        danger={what === 'revoke'}
        busy={act.isPending}
        error={act.error ? failureWords(act.error) : undefined}
        onConfirm={confirm}
        onClose={stop}
      />
    </View>
  );
}

const styles = StyleSheet.create({
  all: { gap: space.m },
  acts: { flexDirection: 'row', flexWrap: 'wrap', gap: space.s },
});
