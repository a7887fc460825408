import type { Finding } from '@/protocols/types';
import type { FindingView } from '@/shared/contracts/common';
import { describeFinding, type FindingWords } from '@/shared/findings';

const order = { stop: 0, warn: 1, note: 2 } as const;

/** Findings with their words, stops first. */
export const presentFindings = (findings: readonly Finding[], words: FindingWords): FindingView[] =>
  [...findings]
    .sort((a, b) => order[a.severity] - order[b.severity])
    .map((finding) => ({ ...finding, ...describeFinding(finding, words) }));
