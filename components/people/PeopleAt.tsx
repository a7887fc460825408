import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { useCan, useMe } from '@/hooks/useMe';
import { usePeople, usePeopleActions } from '@/hooks/usePeople';
import type { PropertySummary } from '@/shared/contracts/people';
import { t, tData } from '@/shared/messages';
import type { Output } from '@/shared/routes';
import { dayClock } from '@/shared/when';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { DataTable, type Column } from '../ui/DataTable';
import { Confirm } from '../ui/Dialog';
import { RailList, RailRow } from '../ui/Rail';
import { EmptyState, failureWords, Loaded } from '../ui/states';
import { Text } from '../ui/Text';
import { toast } from '../ui/toast';
import { InviteForm } from './InviteForm';

type Everyone = Output<'GET /api/properties/:propertyId/people'>;
type Person = Everyone['people'][number];
type Invitation = Everyone['invitations'][number];
type Asking = { kind: 'end'; id: string; name: string } | { kind: 'withdraw'; id: string; name: string };

const roleWord = (role: string) => tData(`role.${role}`, role);

function columns(mayEnd: (person: Person) => boolean, ask: (asking: Asking) => void): Column<Person>[] {
  return [
    { key: 'name', title: t('people.name'), primary: true, cell: (person) => person.name },
    { key: 'role', title: t('people.role'), cell: (person) => roleWord(person.role) },
    { key: 'email', title: t('people.email'), cell: (person) => person.email },
    { key: 'through', title: t('people.through'), cell: (person) => person.through ?? t('people.direct') },
    {
      key: 'act',
      title: t('people.act'),
      cell: (person) => {
        const { membershipId, name } = person;
        if (!membershipId || !mayEnd(person)) return null;
        const label = t('people.endOf', { name });
        return (
          <Button
            label={t('people.end')}
            accessibleLabel={label}
            onPress={() => ask({ kind: 'end', id: membershipId, name })}
          />
        );
      },
    },
  ];
}

interface InvitationsProps {
  invitations: readonly Invitation[];
  zone: string;
  onWithdraw?: ((invitation: Invitation) => void) | undefined;
}

const Invitations = ({ invitations, zone, onWithdraw }: InvitationsProps) => (
  <View style={styles.part}>
    <Text variant="subheading" level={3}>
      {t('people.invitations')}
    </Text>
    {invitations.length === 0 ? (
      <Text tone="quiet">{t('people.noInvitations')}</Text>
    ) : (
      <RailList label={t('people.invitations')}>
        {invitations.map((invitation) => (
          <RailRow
            key={invitation.id}
            title={invitation.email}
            subtitle={[
              roleWord(invitation.role),
              t('people.until', { when: dayClock(Date.parse(invitation.expiresAt), zone) }),
              t('people.invitedBy', { name: invitation.invitedBy }),
            ].join(' · ')}
            trailing={
              onWithdraw ? (
                <Button
                  label={t('people.withdraw')}
                  accessibleLabel={t('people.withdrawOf', { email: invitation.email })}
                  onPress={() => onWithdraw(invitation)}
                />
              ) : null
            }
          />
        ))}
      </RailList>
    )}
  </View>
);

/** What is being asked about a person or an invitation, and doing it. */
function useQuestion(property: PropertySummary, { withdraw, end }: ReturnType<typeof usePeopleActions>) {
  const [asking, setAsking] = useState<Asking | null>(null);
  const ending = asking?.kind === 'end';
  const name = asking?.name ?? '';
  const act = ending ? end : withdraw;
  const stop = () => {
    setAsking(null);
    act.reset();
  };
  const confirm = () => {
    if (!asking) return;
    const onSuccess = () => {
      setAsking(null);
      toast(ending ? t('people.ended', { name, property: property.name }) : t('people.withdrawn'));
    };
    act.mutate(asking.id, { onSuccess });
  };
  return { asking, ask: setAsking, ending, name, act, stop, confirm };
}

/** Who is at a property and who is invited; managers invite, withdraw and end. */
export function PeopleAt({ property }: { property: PropertySummary }) {
  const everyone = usePeople(property.id);
  const actions = usePeopleActions(property.id);
  const { invite } = actions;
  const me = useMe();
  const manages = useCan()('people.manage', property.id);
  const { asking, ask, ending, name, act, stop, confirm } = useQuestion(property, actions);
  return (
    <View style={styles.part}>
      <Text variant="heading" level={2}>
        {t('people.at', { property: property.name })}
      </Text>
      <Loaded query={everyone}>
        {(all) => (
          <>
            {all.people.length === 0 ? (
              <EmptyState title={t('people.none')} next={t('people.noneNext')} />
            ) : (
              <DataTable
                caption={t('people.at', { property: property.name })}
                hideCaption
                columns={columns((person) => manages && person.userId !== me.data?.user.id, ask)}
                rows={all.people}
                rowKey={(person) => `${person.userId}-${person.role}`}
              />
            )}
            <Invitations
              invitations={all.invitations}
              zone={property.zone}
              onWithdraw={manages ? ({ id, email }) => ask({ kind: 'withdraw', id, name: email }) : undefined}
            />
          </>
        )}
      </Loaded>
      {manages ? <InviteForm propertyId={property.id} invite={invite} /> : null}
      <Confirm
        open={asking !== null}
        danger={ending}
        title={ending ? t('people.endTitle', { name }) : t('people.withdrawTitle', { email: name })}
        body={ending ? t('people.endBody', { name, property: property.name }) : t('people.withdrawBody')}
        confirmLabel={t(ending ? 'people.end' : 'people.withdraw')}
        busy={act.isPending}
        error={act.error ? failureWords(act.error) : undefined}
        onConfirm={confirm}
        onClose={stop}
      />
    </View>
  );
}

const styles = StyleSheet.create({ part: { gap: space.m, marginBottom: space.l } });
