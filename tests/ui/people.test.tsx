import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';

import { PeopleScreen } from '@/components/people/PeopleScreen';
import { brindleGap, person } from '../support/me';
import { refusal, renderWithQuery, serve } from '../support/render';

const tom = {
  membershipId: brindleGap,
  userId: 'u2',
  name: 'Tom Rails',
  email: 'tom@example.org',
  role: 'staff',
  through: null,
};
const ines = {
  membershipId: null,
  userId: 'u3',
  name: 'Ines Vet',
  email: 'ines@example.org',
  role: 'vet',
  through: 'Quillback Vets',
};
const open = {
  id: 'i1',
  email: 'new@example.org',
  role: 'staff',
  expiresAt: '2026-10-09T02:00:00Z',
  invitedBy: 'Mara Field',
};
const everyone = { people: [tom, ines], invitations: [open] };
const url = 'https://yards.example.org/api/calendar/a-secret-of-some-length.ics';
const ute = {
  id: 'l1',
  label: 'Ute phone',
  propertyId: null,
  property: null,
  createdAt: '2026-10-01T02:00:00Z',
  lastReadAt: null,
};
const at = `/api/properties/${brindleGap}`;
const base = (role: 'manager' | 'staff' | 'vet' = 'manager') => ({
  'GET /api/me': person(role),
  [`GET ${at}/people`]: everyone,
  'GET /api/calendar-links': { items: [ute] },
});

describe('people', () => {
  it('shows who is here and who is invited, in the time of the property', async () => {
    serve(base());
    renderWithQuery(<PeopleScreen />);
    expect(await screen.findByText('Tom Rails')).toBeInTheDocument();
    expect(screen.getByText('Quillback Vets')).toBeInTheDocument();
    // 02:00 UTC is 13:00 in New South Wales in October (UTC+11)
    expect(screen.getByText(/staff · open until Fri 9 Oct 13:00 · invited by Mara Field/)).toBeInTheDocument();
  });

  it('ends a membership only after asking, and never that of somebody who comes through a practice', async () => {
    const sent = serve({ ...base(), [`DELETE /api/memberships/${brindleGap}`]: { ok: true } });
    renderWithQuery(<PeopleScreen />);
    await userEvent.click(await screen.findByRole('button', { name: 'End the membership of Tom Rails' }));
    expect(sent.some(({ route }) => route.startsWith('DELETE'))).toBe(false);
    expect(screen.queryByRole('button', { name: 'End the membership of Ines Vet' })).toBeNull();
    await userEvent.click(screen.getByRole('button', { name: 'End' }));
    await waitFor(() => expect(sent.some(({ route }) => route === `DELETE /api/memberships/${brindleGap}`)).toBe(true));
    await waitFor(() => expect(screen.queryByRole('dialog')).toBeNull());
  });

  it('keeps what was typed when an invitation is refused, and clears it when it is sent', async () => {
    const route = `POST ${at}/invitations`;
    serve({
      ...base(),
      [route]: () => refusal(400, 'invalid', 'Look at the fields.', [{ path: 'email', message: 'Not an address.' }]),
    });
    renderWithQuery(<PeopleScreen />);
    const field = await screen.findByLabelText('E-mail of the person');
    await userEvent.type(field, 'tom{Enter}');
    await waitFor(() => expect(field).toHaveAccessibleDescription('Not an address.'));
    expect(field).toHaveValue('tom');
    const sent = serve({ ...base(), [route]: () => Response.json(open, { status: 201 }) });
    await userEvent.click(screen.getByRole('radio', { name: /manager/ }));
    await userEvent.type(field, '@example.org{Enter}');
    await waitFor(() => expect(field).toHaveValue(''));
    const body = sent.find((one) => one.route === route)?.body;
    expect(body).toMatchObject({ email: 'tom@example.org', role: 'manager' });
  });

  it('shows staff no people and no invitations, only their own calendar links', async () => {
    const sent = serve(base('staff'));
    renderWithQuery(<PeopleScreen />);
    expect(await screen.findByText('Ute phone')).toBeInTheDocument();
    expect(screen.queryByText('Tom Rails')).toBeNull();
    expect(screen.queryByLabelText('E-mail of the person')).toBeNull();
    expect(sent.some((one) => one.route.endsWith('/people'))).toBe(false);
  });

  it('lets a vet read but not manage', async () => {
    serve(base('vet'));
    renderWithQuery(<PeopleScreen />);
    expect(await screen.findByText('Tom Rails')).toBeInTheDocument();
    expect(screen.queryByRole('button', { name: /End the membership/ })).toBeNull();
    expect(screen.queryByRole('button', { name: /Withdraw/ })).toBeNull();
  });
});

describe('calendar links', () => {
  it('shows the secret address of a new link once, with a code to scan', async () => {
    const sent = serve({ ...base('staff'), 'POST /api/calendar-links': { ...ute, id: 'l2', label: 'House', url } });
    renderWithQuery(<PeopleScreen />);
    await userEvent.type(await screen.findByLabelText('Name of the link'), 'House{Enter}');
    expect(await screen.findByText('This address is shown once.')).toBeInTheDocument();
    expect(screen.getByLabelText('Address')).toHaveValue(url);
    expect(screen.getByRole('img', { name: 'QR code of the address' })).toBeInTheDocument();
    expect(screen.getByRole('link', { name: 'Open in this device’s calendar' })).toHaveAttribute(
      'href',
      url.replace('https:', 'webcal:'),
    );
    expect(sent.find((one) => one.route === 'POST /api/calendar-links')?.body).toMatchObject({
      label: 'House',
      propertyId: null,
    });
    await userEvent.click(screen.getByRole('button', { name: 'I have it' }));
    expect(screen.queryByLabelText('Address')).toBeNull();
    expect(document.body.innerHTML).not.toContain('a-secret-of-some-length');
  });

  it('replaces and revokes only after asking', async () => {
    const sent = serve({
      ...base('staff'),
      'POST /api/calendar-links/l1/replace': { ...ute, url },
      'DELETE /api/calendar-links/l1': { ok: true },
    });
    const acts = () => sent.map(({ route }) => route).filter((route) => !route.startsWith('GET'));
    renderWithQuery(<PeopleScreen />);
    await userEvent.click(await screen.findByRole('button', { name: 'Replace the address of Ute phone' }));
    expect(acts()).toEqual([]);
    await userEvent.click(screen.getByRole('button', { name: 'Replace' }));
    expect(await screen.findByLabelText('Address')).toHaveValue(url);
    await userEvent.click(screen.getByRole('button', { name: 'Revoke Ute phone' }));
    await userEvent.keyboard('{Escape}');
    expect(acts()).toEqual(['POST /api/calendar-links/l1/replace']);
    await userEvent.click(screen.getByRole('button', { name: 'Revoke Ute phone' }));
    await userEvent.click(screen.getByRole('button', { name: 'Revoke' }));
    await waitFor(() =>
      expect(acts()).toEqual(['POST /api/calendar-links/l1/replace', 'DELETE /api/calendar-links/l1']),
    );
    await waitFor(() => expect(screen.queryByLabelText('Address')).toBeNull());
  });
});
