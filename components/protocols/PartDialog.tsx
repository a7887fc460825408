import type { Part, PartProps } from './BenchEdit';
import { DetailsDialog } from './dialogs/DetailsDialog';
import { GapDialog } from './dialogs/GapDialog';
import { NewGapDialog, NewVisitDialog } from './dialogs/NewParts';
import { StepDialog } from './dialogs/StepDialog';
import { VisitDialog } from './dialogs/VisitDialog';

/** The dialog of the part that is open. A part that is gone closes it. */
export function PartDialog({ part, ...rest }: PartProps & { part: Part }) {
  const { body } = rest;
  if (part.what === 'details') return <DetailsDialog {...rest} />;
  if (part.what === 'newVisit') return <NewVisitDialog {...rest} />;
  if (part.what === 'newGap') return <NewGapDialog {...rest} />;
  if (part.what === 'step') {
    const step = body.steps.find((one) => one.id === part.id);
    return step ? <StepDialog key={step.id} step={step} {...rest} /> : null;
  }
  if (part.what === 'gap') {
    const gap = body.gaps.find((one) => one.id === part.id);
    return gap ? <GapDialog key={gap.id} gap={gap} {...rest} /> : null;
  }
  if (part.what !== 'visit') return null;
  const visit = body.visits.find((one) => one.id === part.id);
  return visit ? <VisitDialog key={visit.id} visit={visit} {...rest} /> : null;
}
