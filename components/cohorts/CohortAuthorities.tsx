import { useState } from 'react';
import { View } from 'react-native';

import type { Authority } from '@/shared/contracts/medicines';
import type { CohortDetail } from '@/shared/contracts/cohorts';
import { t, tData } from '@/shared/messages';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { RailList, RailRow } from '../ui/Rail';
import { Text } from '../ui/Text';
import { AuthoriseDialog } from './AuthoriseDialog';

type Need = CohortDetail['needs'][number];

export const amountWords = (amount: number | null, unit: string): string =>
  amount === null
    ? t('protocols.amountMissing')
    : `${amount} ${tData(amount === 1 ? `unit.${unit}` : `unitMany.${unit}`, tData(`unit.${unit}`, unit))}`;

/** What the cohort needs authorised, and what is. The vet authorises from here. */
export function CohortAuthorities({ cohort }: { cohort: CohortDetail }) {
  const [need, setNeed] = useState<Need | null>(null);
  const may =
    cohort.abilities.includes('authority.write') && (cohort.state === 'planning' || cohort.state === 'running');
  return (
    <View style={{ gap: space.m }}>
      {cohort.needs.length > 0 ? (
        <View>
          <Text variant="heading" level={2}>
            {t('planner.needs')}
          </Text>
          <RailList label={t('planner.needs')}>
            {cohort.needs.map((one) => (
              <NeedRow
                key={`${one.active}${one.amount}${one.classes.join()}`}
                need={one}
                {...(may ? { onAuthorise: () => setNeed(one) } : {})}
              />
            ))}
          </RailList>
        </View>
      ) : null}
      <View>
        <Text variant="heading" level={2}>
          {t('cohorts.authorities')}
        </Text>
        {cohort.authorities.length === 0 ? <Text tone="quiet">{t('medicines.noAuthorities')}</Text> : null}
        <RailList label={t('cohorts.authorities')}>
          {cohort.authorities.map((authority) => (
            <AuthorityRow key={authority.id} authority={authority} />
          ))}
        </RailList>
      </View>
      {need ? <AuthoriseDialog cohort={cohort} need={need} onClose={() => setNeed(null)} /> : null}
    </View>
  );
}

export function NeedRow({ need, onAuthorise }: { need: Need; onAuthorise?: () => void }) {
  const short = need.covered < need.head;
  const active = tData(`active.${need.active}`, need.active);
  return (
    <RailRow
      title={`${active}, ${amountWords(need.amount, need.unit)}`}
      subtitle={need.classes.map((c) => tData(`class.${c}`, c)).join(', ')}
      {...(short ? { mark: 'stop' as const } : {})}
      trailing={
        <Text strong tone={short ? 'stop' : 'good'}>
          {short
            ? t('planner.coveredOf', { covered: need.covered, head: need.head })
            : t('planner.coveredAll', { head: need.head })}
        </Text>
      }
    >
      {short && onAuthorise ? (
        <Button label={t('medicines.authoriseFor', { active: active.toLowerCase() })} onPress={onAuthorise} />
      ) : null}
    </RailRow>
  );
}

const AuthorityRow = ({ authority }: { authority: Authority }) => (
  <RailRow
    title={`${tData(`active.${authority.active}`, authority.active)}, ${t('medicines.each', { amount: amountWords(authority.amount, authority.unit) })}`}
    subtitle={[
      authority.withdrawnAt
        ? t('medicines.withdrawn')
        : t('medicines.valid', { from: authority.validFrom, to: authority.validTo }),
      t('medicines.by', { name: authority.issuedBy }),
      authority.directions,
    ]
      .filter(Boolean)
      .join(' · ')}
    trailing={<Text strong>{t('medicines.balance', { used: authority.used, head: authority.head })}</Text>}
  />
);
