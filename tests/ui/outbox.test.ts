import { beforeEach, describe, expect, it } from 'vitest';

import { applyTaken } from '@/hooks/applyTaken';
import { dismiss, flushOutbox, keep, outboxEntries, type OutboxEntry, type Send } from '@/lib/outbox';
import type { TaskWork } from '@/shared/contracts/work';

const entry = (id: string, more: Partial<OutboxEntry> = {}): OutboxEntry => ({
  id,
  userId: 'me',
  taskId: 'task',
  kind: 'records',
  body: { records: [{ id: `r-${id}`, outcome: 'done' }] },
  animalIds: [`a-${id}`],
  head: 1,
  at: '2026-05-04T00:00:00.000Z',
  state: 'waiting',
  ...more,
});

beforeEach(async () => {
  for (const { id } of outboxEntries()) await dismiss(id);
});

describe('what is kept on the phone', () => {
  it('goes out in order and is forgotten once taken', async () => {
    await keep(entry('1'));
    await keep(entry('2'));
    const sent: string[] = [];
    await flushOutbox('me', async (e) => {
      sent.push(e.id);
      return { result: 'taken' };
    });
    expect([sent, outboxEntries()]).toEqual([['1', '2'], []]);
  });

  it('stays, in order, while there is no signal', async () => {
    await keep(entry('1'));
    await keep(entry('2'));
    await flushOutbox('me', async () => ({ result: 'later' }));
    expect(outboxEntries().map((e) => [e.id, e.state])).toEqual([
      ['1', 'waiting'],
      ['2', 'waiting'],
    ]);
  });

  it('stays with the reason when it is refused, and does not hold up what follows', async () => {
    await keep(entry('1'));
    await keep(entry('2'));
    const send: Send = async (e) =>
      e.id === '1' ? { result: 'refused', message: 'Recorded already' } : { result: 'taken' };
    await flushOutbox('me', send);
    expect(outboxEntries()).toMatchObject([{ id: '1', state: 'refused', message: 'Recorded already' }]);
  });

  it('of another person on the same phone is not sent by this one', async () => {
    await keep(entry('1', { userId: 'other' }));
    await flushOutbox('me', async () => ({ result: 'taken' }));
    expect(outboxEntries().map((e) => e.id)).toEqual(['1']);
  });

  it('that comes in while another is on its way goes out too', async () => {
    await keep(entry('1'));
    const sent: string[] = [];
    const send: Send = async (e) => {
      sent.push(e.id);
      if (e.id === '1') await keep(entry('2'));
      return { result: 'taken' };
    };
    await Promise.all([flushOutbox('me', send), flushOutbox('me', send)]);
    expect(sent).toEqual(['1', '2']);
  });
});

describe('an act that the server has just taken', () => {
  const animal = (id: string) => ({ animalId: `a-${id}`, tag: id, eid: null, class: 'heifer', record: null });
  const work = {
    task: { done: 0, zone: 'Australia/Sydney' },
    animals: [animal('1'), animal('2')],
    records: [],
  } as unknown as TaskWork;

  it('stands in the work at once, so that the animal is not offered again', () => {
    const after = applyTaken(work, entry('1'), 'Josie');
    expect(after.animals[0]?.record).toMatchObject({ id: 'r-1', outcome: 'done', by: 'Josie', atLocal: '10:00' });
    expect(after.animals[1]?.record).toBeNull();
    expect(after.task.done).toBe(1);
  });

  it('is gone again when it is taken back', () => {
    const after = applyTaken(
      applyTaken(work, entry('1'), 'Josie'),
      entry('u', { kind: 'undo', recordId: 'r-1' }),
      'Josie',
    );
    expect(after.animals[0]?.record).toBeNull();
    expect(after.task.done).toBe(0);
  });
});
