import type { Condition, ProtocolBody } from '@/protocols/types';
import { t, tData } from './messages';

const orWords = (parts: string[]): string => parts.join(` ${t('protocols.or')} `);

/** Who a step is for, in words: `all`, `not in heat`, `with eCG`. Ids that the body lacks are shown as they are. */
export function conditionWords(
  condition: Condition | undefined,
  body: Pick<ProtocolBody, 'options' | 'observations'>,
): string {
  if (!condition) return t('protocols.all');
  if ('all' in condition) return condition.all.map((c) => conditionWords(c, body)).join(` ${t('protocols.and')} `);
  if ('any' in condition) return orWords(condition.any.map((c) => conditionWords(c, body)));
  if ('not' in condition) return `${t('protocols.not')} ${conditionWords(condition.not, body)}`;
  if ('class' in condition) return orWords(condition.class.map((c) => tData(`class.${c}`, c)));
  if ('option' in condition) {
    const option = body.options.find((o) => o.id === condition.option);
    return option?.values.find((v) => v.id === condition.is)?.label ?? condition.is;
  }
  const seen = body.observations.find((o) => o.id === condition.observed);
  return seen?.results.find((r) => r.id === condition.is)?.label ?? condition.is;
}
