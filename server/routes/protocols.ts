import {
  createProtocol,
  discardVersion,
  openWorkingCopy,
  retireVersion,
  saveVersion,
  signOffVersion,
} from '../commands/protocols';
import type { Handlers } from '../http/handler';
import { listLibrary, listProtocols, readLibrary, readProtocol, readVersion } from '../queries/protocols';
import { signedIn } from './people';

/** The library, an organisation's protocols, and their versions. */
export const protocolHandlers: Handlers<
  | 'GET /api/library'
  | 'GET /api/library/:libraryId'
  | 'GET /api/protocols'
  | 'POST /api/protocols'
  | 'GET /api/protocols/:protocolId'
  | 'POST /api/protocols/:protocolId/working-copies'
  | 'GET /api/protocol-versions/:versionId'
  | 'PUT /api/protocol-versions/:versionId'
  | 'DELETE /api/protocol-versions/:versionId'
  | 'POST /api/protocol-versions/:versionId/sign-off'
  | 'POST /api/protocol-versions/:versionId/retire'
> = {
  'GET /api/library': async () => listLibrary(),
  'GET /api/library/:libraryId': async ({ input }) => readLibrary(input.params.libraryId),
  'GET /api/protocols': ({ actor, deps }) => listProtocols(deps, signedIn(actor)),
  'POST /api/protocols': async ({ actor, input, deps }) => {
    const id = await createProtocol(deps, signedIn(actor), input.body);
    return readProtocol(deps, signedIn(actor), id);
  },
  'GET /api/protocols/:protocolId': ({ actor, input, deps }) =>
    readProtocol(deps, signedIn(actor), input.params.protocolId),
  'POST /api/protocols/:protocolId/working-copies': async ({ actor, input, deps }) => {
    const id = await openWorkingCopy(deps, signedIn(actor), input.params.protocolId, input.body.id);
    return readVersion(deps, signedIn(actor), id);
  },
  'GET /api/protocol-versions/:versionId': ({ actor, input, deps }) =>
    readVersion(deps, signedIn(actor), input.params.versionId),
  'PUT /api/protocol-versions/:versionId': async ({ actor, input, deps }) => {
    await saveVersion(deps, signedIn(actor), input.params.versionId, input.body);
    return readVersion(deps, signedIn(actor), input.params.versionId);
  },
  'DELETE /api/protocol-versions/:versionId': async ({ actor, input, deps }) => {
    await discardVersion(deps, signedIn(actor), input.params.versionId);
    return { ok: true };
  },
  'POST /api/protocol-versions/:versionId/sign-off': async ({ actor, input, deps }) => {
    await signOffVersion(deps, signedIn(actor), input.params.versionId, input.body.revision);
    return readVersion(deps, signedIn(actor), input.params.versionId);
  },
  'POST /api/protocol-versions/:versionId/retire': async ({ actor, input, deps }) => {
    await retireVersion(deps, signedIn(actor), input.params.versionId);
    return readVersion(deps, signedIn(actor), input.params.versionId);
  },
};
