import type { TaskStep } from '@/shared/contracts/cohorts';
import { tData } from '@/shared/messages';
import { Notice } from '../ui/Notice';
import { cautionsOf } from './doses';

/** The cautions where the act is done. They ask nothing and keep nothing about anyone's health. */
export const Cautions = ({ steps, only }: { steps: readonly TaskStep[]; only?: string }) => (
  <>
    {cautionsOf(steps)
      .filter((key) => only === undefined || key === only)
      .map((key) => (
        <Notice key={key} tone="warn" silent title={tData(`cautionTitle.${key}`, '')}>
          {tData(`caution.${key}`, key)}
        </Notice>
      ))}
  </>
);
