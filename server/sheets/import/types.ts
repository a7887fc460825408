import type { z } from 'zod';

import type { AnimalClass, LocalDate } from '@/protocols/types';
import type { dateOrder, importField } from '@/shared/contracts/herd';
import type { MessageKey, MessageParams } from '@/shared/messages';

export type ImportField = z.infer<typeof importField>;
export type DateOrder = z.infer<typeof dateOrder>;

/** A sentence for people, as a key of the catalogue: reading a file knows no language. */
export interface Sentence {
  key: MessageKey;
  params?: MessageParams;
}
/** What is wrong with one cell; `field` is empty when it is the row as a whole. */
export interface Problem extends Sentence {
  field: ImportField | '';
}

/** What an animal holds that an import can set. Absent: the file says nothing of it, so it is left as it is. */
export interface AnimalValues {
  eid?: string;
  class?: AnimalClass;
  breed?: string;
  birth?: LocalDate;
  sire?: string;
  dam?: string;
  lastCalving?: LocalDate;
  lastService?: LocalDate;
  knownEmpty?: boolean;
  /** Kilograms, to a tenth. */
  weightKg?: number;
  condition?: number;
  paddock?: string;
  note?: string;
}
export type ValueField = keyof AnimalValues;

/** An animal of the herd as it stands before the import. */
export type HerdAnimal = { id: string; tag: string; state: 'present' | 'left' } & {
  [F in ValueField]-?: NonNullable<AnimalValues[F]> | null;
};

/** The file as text in cells: headings made unique, blank rows left out, each row with its line in the file. */
export interface Sheet {
  encoding: string;
  delimiter: string;
  headers: string[];
  rows: SheetRow[];
}
export interface SheetRow {
  line: number;
  cells: string[];
}

/** The file cannot be read at all. */
export interface Unreadable {
  unreadable: Sentence;
}
