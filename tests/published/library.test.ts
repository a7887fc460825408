import { describe, expect, it } from 'vitest';

import { library } from '@/protocols/library';
import { checkProtocol } from '@/protocols/plan/check';
import { protocolBody } from '@/shared/contracts/protocols';

describe('the library', () => {
  it('holds the twelve kinds asked for and more, under ids that are used once', () => {
    expect(library.length).toBeGreaterThanOrEqual(12);
    expect(new Set(library.map((entry) => entry.id)).size).toBe(library.length);
  });

  it.each(library.map((entry) => [entry.id, entry.body] as const))(
    '%s is consistent in every choice and branch',
    (_, body) => {
      const { findings, scenarios } = checkProtocol(body);
      expect(findings.filter((finding) => finding.severity === 'stop')).toEqual([]);
      expect(scenarios.every((scenario) => scenario.consistent)).toBe(true);
    },
  );

  it.each(library.map((entry) => [entry.id, entry.body] as const))(
    '%s is plain data that the contract takes',
    (_, body) => {
      expect(protocolBody.parse(JSON.parse(JSON.stringify(body)))).toEqual(body);
    },
  );

  it.each(library.map((entry) => [entry.id, entry.body] as const))(
    '%s names a listed source, and its mark, for every gap',
    (_, body) => {
      const sources = new Set(body.sources.map((source) => source.id));
      for (const gap of body.gaps) {
        expect(sources, `${gap.id}: ${gap.source}`).toContain(gap.source);
        expect(['read', 'memory', 'derived']).toContain(gap.mark);
      }
      for (const source of body.sources) {
        expect(source.title && source.publisher).toBeTruthy();
        expect(['read', 'memory', 'derived']).toContain(source.mark);
      }
    },
  );

  it.each(library.map((entry) => [entry.id, entry.body] as const))(
    '%s never calls a gap read whose source is from memory',
    (_, body) => {
      const marks = new Map(body.sources.map((source) => [source.id, source.mark]));
      for (const gap of body.gaps) if (marks.get(gap.source ?? '') === 'memory') expect(gap.mark).toBe('memory');
    },
  );

  it('defers to law wherever oestradiol is given', () => {
    for (const { id, body } of library) {
      const gives = body.steps.some((step) => step.kind.startsWith('oestradiol'));
      expect(
        body.notes.some((note) => note.startsWith('Oestradiol:')),
        id,
      ).toBe(gives);
    }
  });
});
