import { derivedId } from '../commands/recordWork';

/** The demo's ids are made of names, so that seeding again makes the same ones. */
export const demoId = (name: string): string => derivedId('yardbell demo', name);
