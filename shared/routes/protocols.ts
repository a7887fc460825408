import { z } from 'zod';

import * as c from '../contracts/common';
import * as p from '../contracts/protocols';
import { part } from './spec';

const version = z.object({ versionId: c.id });
const protocol = z.object({ protocolId: c.id });

export const protocolRoutes = part({
  'GET /api/library': {
    summary: 'Published protocols',
    who: 'signedIn',
    output: z.object({ items: z.array(p.librarySummary) }),
  },
  'GET /api/library/:libraryId': {
    summary: 'A published protocol with its sources',
    who: 'signedIn',
    params: z.object({ libraryId: z.string().max(80) }),
    output: p.libraryProtocol,
  },
  'GET /api/protocols': {
    summary: "Protocols of own organisations, and signed-off ones of organisations engaged by the person's properties",
    who: { ability: 'protocol.read', at: 'all' },
    output: z.object({ items: z.array(p.protocolSummary) }),
  },
  'POST /api/protocols': {
    summary: 'Make a protocol: empty, from the library, or from a version',
    who: { ability: 'protocol.edit', at: 'organisationId', in: 'body' },
    body: p.protocolCreate,
    output: p.protocolDetail,
    status: 201,
  },
  'GET /api/protocols/:protocolId': {
    summary: 'A protocol and its versions',
    who: { ability: 'protocol.read', at: 'protocolId' },
    params: protocol,
    output: p.protocolDetail,
  },
  'POST /api/protocols/:protocolId/working-copies': {
    summary: 'Open the next working copy, from the newest version',
    who: { ability: 'protocol.edit', at: 'protocolId' },
    params: protocol,
    body: p.workingCopyCreate,
    output: p.versionDetail,
    status: 201,
  },
  'GET /api/protocol-versions/:versionId': {
    summary: 'A version with its body and findings',
    who: { ability: 'protocol.read', at: 'versionId' },
    params: version,
    output: p.versionDetail,
  },
  'PUT /api/protocol-versions/:versionId': {
    summary: 'Save a working copy; a signed-off version never changes',
    who: { ability: 'protocol.edit', at: 'versionId' },
    params: version,
    body: p.versionPut,
    output: p.versionDetail,
  },
  'DELETE /api/protocol-versions/:versionId': {
    summary: 'Discard a working copy',
    who: { ability: 'protocol.edit', at: 'versionId' },
    params: version,
    output: c.ok,
  },
  'POST /api/protocol-versions/:versionId/sign-off': {
    summary: 'Sign a working copy off; refused while a stop finding stands',
    who: { ability: 'protocol.signOff', at: 'versionId' },
    params: version,
    body: p.signOff,
    output: p.versionDetail,
  },
  'POST /api/protocol-versions/:versionId/retire': {
    summary: 'Retire a signed-off version: running cohorts go on, no new ones start',
    who: { ability: 'protocol.signOff', at: 'versionId' },
    params: version,
    output: p.versionDetail,
  },
});
