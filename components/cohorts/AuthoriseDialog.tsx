import { useState } from 'react';
import { View } from 'react-native';

import { useAuthorise } from '@/hooks/useCohorts';
import { useMedicines } from '@/hooks/useMedicines';
import { fieldError } from '@/lib/api';
import { useKept } from '@/lib/keep';
import type { CohortDetail } from '@/shared/contracts/cohorts';
import { t, tData } from '@/shared/messages';
import { localOf } from '@/shared/when';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { DateField } from '../ui/DateTimeField';
import { Dialog } from '../ui/Dialog';
import { Field } from '../ui/Field';
import { Notice } from '../ui/Notice';
import { Select } from '../ui/Select';
import { failureWords } from '../ui/states';

type Need = CohortDetail['needs'][number];

const number = (text: string): number => Number(text.replace(',', '.'));
const optional = (text: string): number | null => (text.trim() === '' ? null : number(text));
const dayOf = (at: string | null, zone: string, plusDays: number): string =>
  localOf((at ? Date.parse(at) : Date.now()) + plusDays * 86_400_000, zone).slice(0, 10);

/** What a form for a need begins with: the protocol's dose, the cohort's head, and days around those it is given on. */
const first = (need: Need, cohort: CohortDetail) => ({
  head: String(need.head - need.covered),
  amount: need.amount === null ? '' : String(need.amount),
  productId: 'any',
  validFrom:
    dayOf(need.firstAt, cohort.zone, -7) < dayOf(null, cohort.zone, 0)
      ? dayOf(need.firstAt, cohort.zone, -7)
      : dayOf(null, cohort.zone, 0),
  validTo: dayOf(need.lastAt, cohort.zone, 7),
  meatDays: '',
  milkHours: '',
  directions: '',
});

type AuthorityForm = ReturnType<typeof first>;

const inputOf = (need: Need, form: AuthorityForm) => ({
  active: need.active,
  productId: form.productId === 'any' ? null : form.productId,
  amount: number(form.amount),
  unit: need.unit,
  route: need.route,
  classes: need.classes,
  head: number(form.head),
  validFrom: form.validFrom,
  validTo: form.validTo,
  meatDays: optional(form.meatDays),
  milkHours: optional(form.milkHours),
  directions: form.directions,
});

/** The vet's written direction for one active: what, how much, for how many of which class, valid until. */
export function AuthoriseDialog({ cohort, need, onClose }: { cohort: CohortDetail; need: Need; onClose: () => void }) {
  const [form, setForm, accepted] = useKept(
    `authority-${cohort.id}-${need.active}-${need.amount}`,
    first(need, cohort),
  );
  const [tried, setTried] = useState(false);
  const authorise = useAuthorise(cohort.id);
  const products =
    useMedicines(cohort.propertyId).data?.products.filter((product) => product.active === need.active) ?? [];
  const set = (key: keyof typeof form) => (value: string) => setForm({ ...form, [key]: value });
  const bad = (key: 'head' | 'amount') =>
    tried && !(number(form[key]) > 0)
      ? t(key === 'head' ? 'medicines.needHead' : 'medicines.needAmount')
      : fieldError(authorise.error, key);
  const issue = () => {
    setTried(true);
    if (!(number(form.head) > 0) || !(number(form.amount) > 0)) return;
    authorise.mutate(inputOf(need, form), {
      onSuccess: () => {
        accepted();
        onClose();
      },
    });
  };
  const active = tData(`active.${need.active}`, need.active).toLowerCase();
  return (
    <Dialog
      open
      onClose={onClose}
      title={t('medicines.authoriseFor', { active })}
      actions={
        <>
          <Button kind="primary" label={t('medicines.save')} onPress={issue} busy={authorise.isPending} />
          <Button label={t('ui.cancel')} kind="quiet" onPress={onClose} />
        </>
      }
    >
      <View style={{ gap: space.m }}>
        <Field
          label={t('medicines.head')}
          numeric
          value={form.head}
          onChange={set('head')}
          error={bad('head')}
          hint={need.classes.map((c) => tData(`class.${c}`, c)).join(', ')}
        />
        <Field
          label={`${t('medicines.amount')}, ${tData(`unit.${need.unit}`, need.unit)}`}
          numeric
          value={form.amount}
          onChange={set('amount')}
          error={bad('amount')}
        />
        <Select
          label={t('medicines.product')}
          value={form.productId}
          onChange={set('productId')}
          options={[
            { value: 'any', label: t('medicines.anyProduct') },
            ...products.map((product) => ({ value: product.id, label: product.name })),
          ]}
        />
        <DatesAndWithholding form={form} set={set} error={authorise.error} />
        <Field
          label={t('medicines.directions')}
          multiline
          rows={2}
          value={form.directions}
          onChange={set('directions')}
        />
        <Notice tone="warn" silent>
          {t('medicines.caution')}
        </Notice>
        {authorise.error ? <Notice tone="stop">{failureWords(authorise.error)}</Notice> : null}
      </View>
    </Dialog>
  );
}

interface PartProps {
  form: AuthorityForm;
  set: (key: keyof AuthorityForm) => (value: string) => void;
  error: unknown;
}

/** Until when it holds, and the withholding that the vet writes; empty: as the label says. */
const DatesAndWithholding = ({ form, set, error }: PartProps) => (
  <>
    <DateField
      label={t('medicines.validFrom')}
      value={form.validFrom}
      onChange={set('validFrom')}
      error={fieldError(error, 'validFrom')}
    />
    <DateField
      label={t('medicines.validTo')}
      value={form.validTo}
      onChange={set('validTo')}
      error={fieldError(error, 'validTo')}
    />
    <Field
      label={t('medicines.meatDays')}
      numeric
      value={form.meatDays}
      onChange={set('meatDays')}
      hint={t('medicines.byLabel')}
      error={fieldError(error, 'meatDays')}
    />
    <Field
      label={t('medicines.milkHours')}
      numeric
      value={form.milkHours}
      onChange={set('milkHours')}
      hint={t('medicines.byLabel')}
      error={fieldError(error, 'milkHours')}
    />
  </>
);
