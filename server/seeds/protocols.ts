import { findLibrary } from '@/protocols/library';
import type { ProtocolBody } from '@/protocols/types';
import { Protocol, ProtocolVersion } from '../models';
import { demoId } from './ids';
import { personId, practiceId } from './places';

export const versionId = (name: string, number: number): string => demoId(`version ${name} ${number}`);

async function signedOff(
  name: string,
  libraryId: string,
  signedAt: Date,
  change: (body: ProtocolBody) => ProtocolBody = (b) => b,
): Promise<string> {
  const entry = findLibrary(libraryId);
  if (!entry) throw new Error(`the demo needs the published protocol ${libraryId}`);
  const protocolId = demoId(`protocol ${name}`);
  await Protocol.create({ id: protocolId, organisationId: practiceId, name, libraryId, createdBy: personId('vet') });
  const id = versionId(name, 1);
  const body = change({ ...entry.body, name });
  await ProtocolVersion.create({
    id,
    protocolId,
    number: 1,
    state: 'signedOff',
    body,
    signedBy: personId('vet'),
    signedAt,
    updatedAt: signedAt,
  });
  return id;
}

export interface DemoVersions {
  heifers: string;
  cows: string;
  dairy: string;
}

/** The practice's protocols: three signed off, and a working copy that lets early heats go first. */
export async function seedProtocols(signedAt: Date): Promise<DemoVersions> {
  const heifers = await signedOff('Heifers, 7-day device', 'device-7-heifers', signedAt);
  const cows = await signedOff('Cows with calves, 7-day device', 'device-7-cows', signedAt);
  const dairy = await signedOff('Dairy weekly list, Ovsynch', 'ovsynch-56', signedAt);
  const entry = findLibrary('device-7-heifers');
  if (entry)
    await ProtocolVersion.create({
      id: versionId('Heifers, 7-day device', 2),
      protocolId: demoId('protocol Heifers, 7-day device'),
      number: 2,
      state: 'workingCopy',
      body: {
        ...entry.body,
        name: 'Heifers, 7-day device, wider AI window',
        gaps: entry.body.gaps.map((gap) => (gap.unit === 'elapsedHours' ? { ...gap, least: 50, most: 58 } : gap)),
      },
      updatedAt: signedAt,
    });
  return { heifers, cows, dairy };
}
