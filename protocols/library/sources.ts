import { source } from './parts';

/** Publications that more than one protocol stands on. `read` means the abstract or stored text, not the whole paper. */
export const ndsu = source(
  'ndsu',
  'Planning for Estrous Synchronization',
  'North Dakota State University, Carrington Research Extension Center',
  'read',
  {
    url: 'https://www.ag.ndsu.edu/carringtonrec/center-points/planning-for-estrous-synchronization',
    note: 'Its text calls the first day Day 1 and removal Day 7; the interval itself is 7 days.',
  },
);
export const kstate = source(
  'kstate',
  'Kansas Agricultural Experiment Station Research Reports 4(2), article 4',
  'Kansas State University',
  'read',
  {
    year: 2018,
    url: 'http://newprairiepress.org/kaesrr/vol4/iss2/4/',
  },
);
export const taskForce = source(
  'brtf',
  'Protocols for synchronization of estrus and ovulation in beef cattle (yearly sheets)',
  'Beef Reproduction Task Force',
  'memory',
  {
    note: 'The sheets could not be read; figures are from memory unless another source repeats them.',
  },
);
export const oosthuizen = source(
  'oosthuizen',
  'Delayed fixed-time AI and presynchronisation in beef heifers, multi-state trial',
  'Oosthuizen et al.',
  'read',
  {
    note: '54 h in the control arm, 72 h in the delayed arm. An older multi-state trial (Kansas State, KAESRR 0(1) 215) used 60 h.',
  },
);
export const gunn = source(
  'gunn',
  'Efficacy of the 5-day CO-Synch ovulation synchronization protocol',
  'Gunn et al., The Professional Animal Scientist 32:82-89',
  'read',
  { year: 2016 },
);
export const aabp2009 = source(
  'aabp2009',
  'American Association of Bovine Practitioners, annual conference abstract',
  'AABP',
  'read',
  {
    year: 2009,
    url: 'https://bovine-ojs-tamu.tdl.org/aabp/article/view/4304',
    note: 'The original needed 12 h between the two prostaglandin doses; the trial compared 2 h with 8 h.',
  },
);
export const arkansas = source(
  'arkansas',
  '7 & 7 and 8 & 6 presynchronisation of beef cows',
  'University of Arkansas (thesis abstract)',
  'read',
  {
    url: 'https://katalog.lib.cas.cz/KNAV/EdsRecord/edo,ejs64460946',
  },
);
export const thomas = source(
  'thomas',
  'Split-time artificial insemination in beef cattle II',
  'Thomas et al.',
  'read',
  {
    note: '1,138 heifers; oestrus by 66 h 70-71 %; pregnant 58-62 % served at 66 h, 39-44 % at 90 h.',
  },
);
export const teagasc = source(
  'teagasc',
  'Suckler synchronisation study (2,205 cows, 74 herds)',
  'Teagasc, as reported by Agriland',
  'read',
  {
    url: 'https://www.agriland.ie/farming-news/teagasc-reveals-results-from-suckler-synchronization-study/',
  },
);
export const carvalho = source(
  'carvalho',
  'Journal of Dairy Science 97 (2014), abstract on GGPG and Double-Ovsynch',
  'Carvalho et al., American Dairy Science Association',
  'read',
  { year: 2014 },
);
export const croatian = source(
  'cvj',
  'Pregnancy rates after Presynch-Ovsynch, G6G and Double-Ovsynch',
  'Croatian Veterinary Journal 57(1), article 4',
  'read',
);
export const westcentral = source(
  'unl27',
  'Synchronising heifers with melengestrol acetate and prostaglandin',
  'University of Nebraska-Lincoln, West Central Extension',
  'read',
  {
    url: 'https://digitalcommons.unl.edu/westcentresext/27/',
  },
);
export const sdsuPostpartum =
  'Estrous synchronization protocols for beef cows (South Dakota State University Extension)';
export const cfr529 = '21 CFR 529.1940, progesterone intravaginal inserts (US Food and Drug Administration)';
