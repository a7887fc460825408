import type { ProtocolBody } from '@/protocols/types';

/** Which part is open in a dialog. */
export type Part = { what: 'step' | 'gap' | 'visit'; id: string } | { what: 'details' | 'newVisit' | 'newGap' };

/** What the parts of the bench call while the protocol is being edited. */
export interface BenchEdit {
  change: (edit: (body: ProtocolBody) => ProtocolBody) => void;
  open: (part: Part) => void;
  addStep: (visit: string) => void;
}

/** What the dialog of a part is given. */
export interface PartProps {
  body: ProtocolBody;
  change: (edit: (body: ProtocolBody) => ProtocolBody) => void;
  onClose: () => void;
}
