import { useState } from 'react';

import { useSaveVersion } from '@/hooks/useProtocols';
import { useKept } from '@/lib/keep';
import { checkProtocol } from '@/protocols/plan/check';
import type { ProtocolBody } from '@/protocols/types';
import type { FindingView } from '@/shared/contracts/common';
import type { VersionDetail } from '@/shared/contracts/protocols';
import { describeFinding } from '@/shared/findings';

/** Findings of a body, worked out here by the same core that the server uses. */
export const liveFindings = (body: ProtocolBody): FindingView[] =>
  checkProtocol(body).findings.map((finding) => ({ ...finding, ...describeFinding(finding, { body }) }));

/**
 * The working copy being edited: every change is kept on this device until the server has it, and can be undone.
 * What is kept from an earlier visit is taken up again.
 */
export function useBench(version: VersionDetail) {
  const saved = version.body as ProtocolBody;
  const [kept, setKept, accepted, wasKept] = useKept<{ body: ProtocolBody; revision: number }>(`bench-${version.id}`, {
    body: saved,
    revision: version.revision,
  });
  const [past, setPast] = useState<ProtocolBody[]>([]);
  const [touched, setTouched] = useState(wasKept);
  const save = useSaveVersion(version.id);
  const body = touched ? kept.body : saved;
  const base = touched ? kept.revision : version.revision;
  const change = (edit: (before: ProtocolBody) => ProtocolBody) => {
    const next = edit(body);
    if (next === body) return;
    setPast((before) => [...before.slice(-49), body]);
    setKept({ body: next, revision: base });
    setTouched(true);
  };
  const forget = () => {
    accepted();
    setTouched(false);
    setPast([]);
  };
  return {
    body,
    touched,
    findings: touched ? liveFindings(body) : version.findings,
    change,
    undo: () => {
      const last = past.at(-1);
      if (!last) return;
      setPast(past.slice(0, -1));
      setKept({ body: last, revision: base });
    },
    canUndo: past.length > 0,
    /** Saves over what was opened; `anyway` over whatever is there now. */
    save: (anyway = false) => save.mutate({ revision: anyway ? version.revision : base, body }, { onSuccess: forget }),
    saving: save.isPending,
    error: save.error,
    forget,
  };
}
