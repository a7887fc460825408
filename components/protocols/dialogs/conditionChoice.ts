import { animalClasses, type Condition, type ProtocolBody } from '@/protocols/types';
import { conditionWords } from '@/shared/conditions';
import { t, tData } from '@/shared/messages';

/** A condition as one choice of a list: all, one option's value, one thing seen, one class; others are kept as they are. */
export function conditionKey(when: Condition | undefined): string {
  if (!when) return 'all';
  if ('option' in when) return `option|${when.option}|${when.is}`;
  if ('observed' in when) return `observed|${when.observed}|${when.is}`;
  if ('class' in when && when.class.length === 1) return `class|${when.class[0]}`;
  return 'kept';
}

export function choicesOf(body: ProtocolBody, when: Condition | undefined): { value: string; label: string }[] {
  return [
    { value: 'all', label: t('protocols.all') },
    ...body.options.flatMap((option) =>
      option.values.map((value) => ({
        value: `option|${option.id}|${value.id}`,
        label: `${option.label}: ${value.label}`,
      })),
    ),
    ...body.observations.flatMap((seen) =>
      seen.results.map((result) => ({
        value: `observed|${seen.id}|${result.id}`,
        label: `${seen.label}: ${result.label}`,
      })),
    ),
    ...animalClasses.map((value) => ({ value: `class|${value}`, label: tData(`class.${value}`, value) })),
    ...(conditionKey(when) === 'kept'
      ? [{ value: 'kept', label: `${conditionWords(when, body)} (${t('protocols.conditionKept')})` }]
      : []),
  ];
}

export function conditionOf(key: string, before: Condition | undefined): Condition | undefined {
  const [kind = '', id = '', is = ''] = key.split('|');
  if (kind === 'kept') return before;
  if (kind === 'option') return { option: id, is };
  if (kind === 'observed') return { observed: id, is };
  const found = animalClasses.find((value) => value === id);
  return kind === 'class' && found ? { class: [found] } : undefined;
}
