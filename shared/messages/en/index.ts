import { cohorts } from './cohorts';
import { common } from './common';
import { fields } from './fields';
import { findings } from './findings';
import { herd } from './herd';
import { http } from './http';
import { medicines } from './medicines';
import { people } from './people';
import { peopleAudit } from './peopleAudit';
import { protocols } from './protocols';
import { server } from './server';
import { telling } from './telling';
import { today } from './today';
import { trade } from './trade';

/** English: every word that people see, one file an area; keys begin with the area's name. */
export const en = {
  ...common,
  ...trade,
  ...findings,
  ...fields,
  ...people,
  ...protocols,
  ...herd,
  ...medicines,
  ...cohorts,
  ...today,
  ...telling,
  ...server,
  ...http,
  ...peopleAudit,
} as const;
