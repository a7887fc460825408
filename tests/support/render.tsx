import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render } from '@testing-library/react';
import type { ReactElement } from 'react';
import { vi } from 'vitest';

/** Renders with a query client of its own that doesn't try again. */
export function renderWithQuery(element: ReactElement) {
  const client = new QueryClient({ defaultOptions: { queries: { retry: false }, mutations: { retry: false } } });
  return { client, ...render(<QueryClientProvider client={client}>{element}</QueryClientProvider>) };
}

export interface Sent {
  route: string;
  body: unknown;
}
type Answer = unknown | ((sent: Sent) => Response | Promise<Response>);

/**
 * A server made of answers by `METHOD /path` (without the query): a value is sent as JSON with status 200, a function makes the
 * response itself. What is not named answers 404. Returns what was sent.
 */
export function serve(answers: Record<string, Answer>): Sent[] {
  const sent: Sent[] = [];
  vi.stubGlobal('fetch', async (path: string, init: RequestInit = {}) => {
    const route = `${init.method ?? 'GET'} ${path.split('?')[0]}`;
    const one: Sent = { route, body: typeof init.body === 'string' ? JSON.parse(init.body) : undefined };
    sent.push(one);
    if (!(route in answers)) return refusal(404, 'notFound', 'Not there.');
    const answer = answers[route];
    return answer instanceof Function ? answer(one) : Response.json(answer);
  });
  return sent;
}

/** A refused request, as the server writes it. */
export const refusal = (status: number, id: string, message: string, fields?: { path: string; message: string }[]) =>
  Response.json({ error: { id, message, ...(fields ? { fields } : {}) } }, { status });

/** A server that is not there. */
export const noServer = () => {
  vi.stubGlobal('fetch', async () => {
    throw new TypeError('Failed to fetch');
  });
};
