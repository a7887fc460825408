import { useCallback, useEffect, useRef, useState } from 'react';

import { useSaveCohort } from '@/hooks/useCohorts';
import { useVersion } from '@/hooks/useProtocols';
import { ApiFailure } from '@/lib/api';
import { useKept } from '@/lib/keep';
import type { CohortDetail } from '@/shared/contracts/cohorts';
import { formOf, patchOf, type PlanForm } from './form';

/** Milliseconds without a change before the form is sent. */
const pause = 500;

/**
 * The planner's form: kept on this device at every keystroke, sent to the server a moment after, one change at a
 * time. A server that is down, or another person who changed the plan, loses nothing that was typed.
 */
export function usePlanForm(cohort: CohortDetail) {
  const [form, setForm, accepted, wasKept] = useKept<PlanForm>(`plan-${cohort.id}`, formOf(cohort));
  const version = useVersion(form.protocolVersionId);
  const save = useSaveCohort(cohort.id);
  const [dirty, setDirty] = useState(wasKept);
  const firstVisit = version.data?.body.visits[0]?.id;
  const state = useRef({ form, revision: cohort.revision, sending: false });
  useEffect(() => {
    state.current.form = form;
    if (cohort.revision > state.current.revision) state.current.revision = cohort.revision;
  });
  const { mutateAsync } = save;
  const send = useCallback(async () => {
    if (state.current.sending) return;
    state.current.sending = true;
    const sent = state.current.form;
    try {
      const answer = await mutateAsync(patchOf(sent, firstVisit, state.current.revision));
      state.current.revision = answer.revision;
      if (state.current.form === sent) {
        accepted();
        setDirty(false);
      }
    } catch (error) {
      // said by `save.error`; the form stays kept here, and a newer revision is taken up for the next try
      if (!(error instanceof ApiFailure)) throw error;
    } finally {
      state.current.sending = false;
    }
  }, [accepted, firstVisit, mutateAsync]);
  const waitsForBody = form.fixed === 'start' && form.protocolVersionId !== '' && firstVisit === undefined;
  useEffect(() => {
    if (!dirty || waitsForBody) return;
    const timer = setTimeout(() => void send(), pause);
    return () => clearTimeout(timer);
  }, [dirty, form, send, waitsForBody]);
  const change = (part: Partial<PlanForm>) => {
    setForm((before) => ({ ...before, ...part }));
    setDirty(true);
  };
  return { form, change, dirty, saving: save.isPending, error: save.error, retry: send, version: version.data };
}
