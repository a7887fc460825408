import type { ProtocolBody } from '../types';
import { coSynchCows, fiveDayCows, irishSuckler, sevenAndSevenCows, sevenDayCows, sevenDayHeifers } from './beefDevice';
import {
  fourteenDayHeifers,
  fourteenDaySplit,
  progestagenFeedHeifers,
  splitTimeCows,
  twoProstaglandins,
} from './beefLong';
import { doubleOvsynch, fiveDayDairyHeifers, g6g, ovsynch56, presynchOvsynch, resynch32, ukDevice } from './dairy';
import { australian8, indicus8, jSynchHeifers, nelore9 } from './oestradiol';

export interface LibraryEntry {
  id: string;
  body: ProtocolBody;
}

/** Published protocols, in the order in which they are shown. Ids never change: copies remember them. */
export const library: readonly LibraryEntry[] = [
  { id: 'device-7-heifers', body: sevenDayHeifers },
  { id: 'device-7-cows', body: sevenDayCows },
  { id: 'device-5-cows', body: fiveDayCows },
  { id: 'device-7-and-7-cows', body: sevenAndSevenCows },
  { id: 'device-7-suckler', body: irishSuckler },
  { id: 'gnrh-pg-cows', body: coSynchCows },
  { id: 'device-14-heifers', body: fourteenDayHeifers },
  { id: 'device-14-heifers-split', body: fourteenDaySplit },
  { id: 'device-7-cows-split', body: splitTimeCows },
  { id: 'progestagen-feed-heifers', body: progestagenFeedHeifers },
  { id: 'two-pg-heifers', body: twoProstaglandins },
  { id: 'oestradiol-9-indicus', body: nelore9 },
  { id: 'oestradiol-8-indicus', body: indicus8 },
  { id: 'oestradiol-6-heifers', body: jSynchHeifers },
  { id: 'oestradiol-8-australia', body: australian8 },
  { id: 'ovsynch-56', body: ovsynch56 },
  { id: 'presynch-12-ovsynch', body: presynchOvsynch },
  { id: 'double-ovsynch', body: doubleOvsynch },
  { id: 'g6g', body: g6g },
  { id: 'resynch-32', body: resynch32 },
  { id: 'device-5-dairy-heifers', body: fiveDayDairyHeifers },
  { id: 'device-7-label-pg-before', body: ukDevice },
];

/** A published protocol by its id; undefined for an unknown one. */
export const findLibrary = (id: string): LibraryEntry | undefined => library.find((entry) => entry.id === id);
