import { useState } from 'react';

import { useMedicineActions } from '@/hooks/useMedicines';
import type { Authority } from '@/shared/contracts/medicines';
import type { PropertySummary } from '@/shared/contracts/people';
import { t, tData } from '@/shared/messages';
import { localOf } from '@/shared/when';
import { dateWords } from '../herd/words';
import { Button } from '../ui/Button';
import { useNow } from '../ui/clock';
import { Confirm } from '../ui/Dialog';
import { RailList, RailRow } from '../ui/Rail';
import { EmptyState, failureWords } from '../ui/states';
import { Text } from '../ui/Text';
import { amountWords, withholdWords } from './words';

interface AuthoritiesProps {
  property: PropertySummary;
  authorities: readonly Authority[];
  mayWithdraw: boolean;
}

/** What the vet has authorised, with what is left of it. */
export function Authorities({ property, authorities, mayWithdraw }: AuthoritiesProps) {
  const [withdrawing, setWithdrawing] = useState<Authority | null>(null);
  const { withdraw } = useMedicineActions(property.id);
  const close = () => {
    withdraw.reset();
    setWithdrawing(null);
  };
  const today = localOf(useNow(), property.zone).slice(0, 10);
  if (authorities.length === 0)
    return <EmptyState title={t('medicines.noAuthorities')} next={t('medicines.noAuthoritiesHint')} />;
  return (
    <>
      <RailList label={t('medicines.authorities')}>
        {authorities.map((authority) => (
          <AuthorityRow
            key={authority.id}
            authority={authority}
            today={today}
            {...(mayWithdraw && !authority.withdrawnAt ? { onWithdraw: () => setWithdrawing(authority) } : {})}
          />
        ))}
      </RailList>
      <Confirm
        open={withdrawing !== null}
        danger
        title={
          withdrawing
            ? t('medicines.withdrawOf', {
                active: tData(`active.${withdrawing.active}`, withdrawing.active),
                head: withdrawing.head,
              })
            : t('medicines.withdraw')
        }
        body={t('medicines.withdrawAsk')}
        confirmLabel={t('medicines.withdraw')}
        busy={withdraw.isPending}
        error={withdraw.error ? failureWords(withdraw.error) : undefined}
        onClose={close}
        onConfirm={() => withdrawing && withdraw.mutate(withdrawing.id, { onSuccess: close })}
      />
    </>
  );
}

/** When it holds: withdrawn, expired, not yet, or from when until when. */
function stateWords(authority: Authority, today: string): string {
  const [from, to] = [dateWords(authority.validFrom), dateWords(authority.validTo)];
  if (authority.withdrawnAt) return t('medicines.withdrawn');
  if (authority.validTo < today) return t('medicines.expired', { day: to });
  if (authority.validFrom > today) return t('medicines.notYet', { day: from, to });
  return t('medicines.valid', { from, to });
}

function AuthorityRow({
  authority,
  today,
  onWithdraw,
}: {
  authority: Authority;
  today: string;
  onWithdraw?: () => void;
}) {
  const over = authority.validTo < today;
  return (
    <RailRow
      title={`${tData(`active.${authority.active}`, authority.active)}, ${t('medicines.each', { amount: amountWords(authority.amount, authority.unit) })}`}
      subtitle={[
        authority.product,
        authority.classes.map((c) => tData(`class.${c}`, c)).join(', '),
        stateWords(authority, today),
        t('medicines.by', { name: authority.issuedBy }),
        withholdWords(authority.meatDays, authority.milkHours),
        authority.directions,
      ]
        .filter(Boolean)
        .join(' · ')}
      {...((over || authority.withdrawnAt) && authority.used < authority.head ? { mark: 'warn' as const } : {})}
      trailing={
        <>
          <Text variant="figure">{Math.max(0, authority.head - authority.used)}</Text>
          <Text variant="small" tone="quiet">
            {t('medicines.leftOf', { head: authority.head })}
          </Text>
          <Text variant="small" tone="quiet">
            {t('medicines.balance', { used: authority.used, head: authority.head })}
          </Text>
        </>
      }
    >
      {onWithdraw ? (
        <Button
          kind="quiet"
          label={t('medicines.withdraw')}
          accessibleLabel={t('medicines.withdrawOf', {
            active: tData(`active.${authority.active}`, authority.active),
            head: authority.head,
          })}
          onPress={onWithdraw}
        />
      ) : null}
    </RailRow>
  );
}
