import { serverImport } from './serverImport';

/** What the server answers when it does not do what was asked. */
export const server = {
  ...serverImport,
  'server.protocol.stale':
    '{name} saved this working copy at {when}, after you opened it. Nothing of yours is lost: load theirs, or save yours over it.',
  'server.protocol.signedOff': 'This version is signed off and never changes. Open the next working copy to edit it.',
  'server.protocol.stopped': 'A stop stands in the way of signing off. Mend it first.',
  'server.protocol.notWorkingCopy': 'This version is not a working copy any more.',
  'server.protocol.alreadyWorkingCopy': 'There is a working copy already. Go on with that one.',
  'server.protocol.onlyWorkingCopy': 'This is the only version of the protocol, so it cannot be discarded.',
  'server.protocol.notSignedOff': 'Only a signed-off version can be retired.',
  'server.protocol.noLibrary': 'There is no published protocol with this id.',
  'server.protocol.noVersion': 'There is no such version to copy from.',
  'server.sameId': 'This id was used for something else already.',
  'server.animal.left': 'The animal has left this herd.',
  'server.animal.calvedBeforeBirth': 'The calving is not after the birth.',
  'server.animal.future': 'This date lies in the future.',
  'server.medicine.notEngaged': 'This organisation is not engaged at the property.',
  'server.medicine.notPractice': 'Only a vet of a practice engaged at the property can authorise medicines.',
  'server.medicine.nameTaken': 'There is a product of this name already.',
  'server.medicine.batchTaken': 'This product batch is here already.',
  'server.medicine.noProduct': 'There is no such product at this property.',
  'server.medicine.wrongActive': 'The product holds another active.',
  'server.medicine.validTo': 'The last day cannot be before the first.',
  'server.medicine.validPast': 'The last day has passed already.',
  'server.medicine.cohortOver': 'The cohort is over: nothing can be authorised for it any more.',
} as const;
