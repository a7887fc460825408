import { act, render, renderHook, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';

import { address, ApiFailure, call, fieldError } from '@/lib/api';
import { newId } from '@/lib/ids';
import { forgetAllKept, readKept, useKept } from '@/lib/keep';
import { useOnline } from '@/lib/online';
import { noServer, refusal, serve } from '../support/render';

afterEach(() => vi.useRealTimers());

const failureOf = async (promise: Promise<unknown>): Promise<ApiFailure> => {
  const thrown: unknown = await promise.then(
    () => null,
    (error: unknown) => error,
  );
  expect(thrown).toBeInstanceOf(ApiFailure);
  return thrown as ApiFailure;
};

describe('call', () => {
  it('puts values into the path and the query, and leaves out what is not there', () => {
    expect(address('GET /api/cohorts/:cohortId', { params: { cohortId: 'a/b' } })).toBe('/api/cohorts/a%2Fb');
    expect(address('GET /api/today', { query: { propertyId: undefined, at: 'x y', n: 2 } })).toBe(
      '/api/today?at=x+y&n=2',
    );
  });

  it('sends JSON and gives the answer', async () => {
    const sent = serve({ 'POST /api/password-resets': { ok: true } });
    await expect(call('POST /api/password-resets', { body: { email: 'a@example.org' } })).resolves.toEqual({
      ok: true,
    });
    expect(sent).toEqual([{ route: 'POST /api/password-resets', body: { email: 'a@example.org' } }]);
  });

  it('turns a refusal into its id, sentence and bad fields', async () => {
    serve({
      'POST /api/session': () =>
        refusal(400, 'invalid', 'Look at the fields.', [{ path: 'email', message: 'Give an address.' }]),
    });
    const failure = await failureOf(call('POST /api/session', { body: { email: '', password: 'x' } }));
    expect([failure.id, failure.status, failure.message]).toEqual(['invalid', 400, 'Look at the fields.']);
    expect(fieldError(failure, 'email')).toBe('Give an address.');
    expect(fieldError(failure, 'password')).toBeUndefined();
  });

  it('says unavailable for the answer of a proxy whose server is down', async () => {
    serve({ 'GET /api/me': () => new Response('<h1>Bad Gateway</h1>', { status: 502 }) });
    expect((await failureOf(call('GET /api/me'))).id).toBe('unavailable');
  });

  it('says unreachable without a network, and notices when there is one again', async () => {
    const Show = () => <p>{useOnline() ? 'online' : 'offline'}</p>;
    render(<Show />);
    noServer();
    await act(async () => void expect((await failureOf(call('GET /api/me'))).id).toBe('unreachable'));
    expect(screen.getByText('offline')).toBeInTheDocument();
    serve({ 'GET /api/health': { ok: true, database: true, time: '2026-10-06T00:00:00Z' } });
    await act(async () => void (await call('GET /api/health')));
    expect(screen.getByText('online')).toBeInTheDocument();
  });

  it('gives up after fifteen seconds', async () => {
    vi.useFakeTimers();
    vi.stubGlobal(
      'fetch',
      (_: string, init: RequestInit) =>
        new Promise((_resolve, reject) => init.signal?.addEventListener('abort', () => reject(new Error('aborted')))),
    );
    const failure = failureOf(call('GET /api/me'));
    await vi.advanceTimersByTimeAsync(15_001);
    expect((await failure).id).toBe('unreachable');
    serve({ 'GET /api/me': {} });
    await call('GET /api/me');
  });

  it('lets the caller stop it without calling that a failure', async () => {
    vi.stubGlobal(
      'fetch',
      (_: string, init: RequestInit) =>
        new Promise((_resolve, reject) =>
          init.signal?.addEventListener('abort', () => reject(new DOMException('x', 'AbortError'))),
        ),
    );
    const stop = new AbortController();
    const waiting = call('GET /api/me', { signal: stop.signal });
    stop.abort();
    await expect(waiting).rejects.not.toBeInstanceOf(ApiFailure);
  });
});

describe('newId', () => {
  const shape = /^[0-9a-f]{8}-[0-9a-f]{4}-4[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/;
  it('makes a version 4 UUID, also on a page without TLS', () => {
    expect(newId()).toMatch(shape);
    vi.stubGlobal('crypto', { getRandomValues: (bytes: Uint8Array) => bytes.fill(255) });
    expect(newId()).toMatch(shape);
  });
});

describe('useKept', () => {
  const form = () => renderHook(() => useKept('form', { name: '' }));

  it('brings back after a reload what was typed, until the server has accepted it', () => {
    const first = form();
    expect(first.result.current[3]).toBe(false);
    act(() => first.result.current[1]({ name: 'Spring' }));
    first.unmount();

    const second = form();
    expect(second.result.current[0]).toEqual({ name: 'Spring' });
    expect(second.result.current[3]).toBe(true);
    act(() => second.result.current[2]());
    second.unmount();

    expect(form().result.current[0]).toEqual({ name: '' });
  });

  it('applies two changes of one moment one after the other', () => {
    const { result } = renderHook(() => useKept('list', [] as string[]));
    act(() => {
      result.current[1]((before) => [...before, 'a']);
      result.current[1]((before) => [...before, 'b']);
    });
    expect(result.current[0]).toEqual(['a', 'b']);
    expect(readKept('list')).toEqual(['a', 'b']);
  });

  it('is another form under another key', () => {
    const { result, rerender } = renderHook(({ id }) => useKept(id, `new ${id}`), { initialProps: { id: 'one' } });
    act(() => result.current[1]('typed'));
    rerender({ id: 'two' });
    expect(result.current[0]).toBe('new two');
    rerender({ id: 'one' });
    expect(result.current[0]).toBe('typed');
  });

  it('forgets everything typed at sign-out, and nothing else', () => {
    localStorage.setItem('yardbell-theme', 'dark');
    const first = form();
    act(() => first.result.current[1]({ name: 'Spring' }));
    forgetAllKept();
    expect(readKept('form')).toBeUndefined();
    expect(localStorage.getItem('yardbell-theme')).toBe('dark');
  });
});
