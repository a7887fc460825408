import { View } from 'react-native';

import { useProtocols } from '@/hooks/useProtocols';
import type { CohortDetail } from '@/shared/contracts/cohorts';
import type { VersionDetail } from '@/shared/contracts/protocols';
import { t } from '@/shared/messages';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { DateTimeField } from '../ui/DateTimeField';
import { Field } from '../ui/Field';
import { RadioGroup } from '../ui/RadioGroup';
import { Select } from '../ui/Select';
import { Text } from '../ui/Text';
import { newGroup, type PlanForm } from './form';
import { GroupFields } from './GroupFields';

interface FieldsProps {
  cohort: CohortDetail;
  form: PlanForm;
  change: (part: Partial<PlanForm>) => void;
  version: VersionDetail | undefined;
}

/** The questions of a plan, in the order in which people answer them. */
export function PlanFields({ cohort, form, change, version }: FieldsProps) {
  const protocols = useProtocols().data?.items.filter((protocol) => protocol.current) ?? [];
  const firstClass = version?.body.classes[0] ?? form.groups[0]?.class ?? 'heifer';
  const setGroup = (i: number, group: PlanForm['groups'][number] | null) =>
    change({ groups: form.groups.flatMap((g, k) => (k === i ? (group ? [group] : []) : [g])) });
  return (
    <View style={{ gap: space.l }}>
      <Field label={t('planner.name')} value={form.name} onChange={(name) => change({ name })} />
      <Select
        label={t('planner.protocol')}
        hint={protocols.length === 0 ? t('planner.noProtocol') : t('planner.protocolHint')}
        value={form.protocolVersionId}
        placeholder=""
        onChange={(protocolVersionId) => change({ protocolVersionId, options: {} })}
        options={protocols.map((protocol) => ({
          value: protocol.current?.id ?? '',
          label: t('cohorts.protocolVersion', { name: protocol.name, number: protocol.current?.number ?? 0 }),
        }))}
      />
      {version?.body.options.map((option) => (
        <Select
          key={option.id}
          label={option.label}
          value={form.options[option.id] ?? option.default}
          onChange={(value) => change({ options: { ...form.options, [option.id]: value } })}
          options={option.values.map((value) => ({ value: value.id, label: value.label }))}
        />
      ))}
      <View style={{ gap: space.m }}>
        <Text variant="heading" level={2}>
          {t('planner.when')}
        </Text>
        <RadioGroup
          label={t('planner.fixed')}
          value={form.fixed}
          onChange={(fixed) => change({ fixed })}
          options={[
            { value: 'service', label: t('planner.fixedService') },
            { value: 'start', label: t('planner.fixedStart') },
          ]}
        />
        <DateTimeField
          label={t('planner.time')}
          value={form.local}
          zone={cohort.zone}
          onChange={(local) => change({ local })}
        />
      </View>
      <View style={{ gap: space.m }}>
        <Text variant="heading" level={2}>
          {t('planner.animals')}
        </Text>
        {form.groups.map((group, i) => (
          <GroupFields
            key={group.id}
            cohort={cohort}
            group={group}
            onChange={(next) => setGroup(i, next)}
            {...(form.groups.length > 1 ? { onRemove: () => setGroup(i, null) } : {})}
          />
        ))}
        <Button
          label={t('planner.addGroup')}
          onPress={() => change({ groups: [...form.groups, newGroup(form.groups.length + 1, firstClass)] })}
        />
      </View>
    </View>
  );
}
