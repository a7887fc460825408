import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';

import { AskResetScreen } from '@/components/session/AskResetScreen';
import { Frame } from '@/components/session/Frame';
import { InvitationScreen } from '@/components/session/InvitationScreen';
import { MoreScreen } from '@/components/session/MoreScreen';
import { SetPasswordScreen } from '@/components/session/SetPasswordScreen';
import { backTo, SignInScreen } from '@/components/session/SignInScreen';
import { keys } from '@/hooks/keys';
import { readKept, writeKept } from '@/lib/keep';
import { calls, setParams, setPathname } from '../support/expo-router';
import { person } from '../support/me';
import { noServer, refusal, renderWithQuery, serve } from '../support/render';
import { setWide } from '../support/ui-setup';

const unauthenticated = () => refusal(401, 'unauthenticated', 'Sign in first.');

describe('sign-in', () => {
  const fill = async (password: string) => {
    await userEvent.type(screen.getByLabelText('E-mail'), 'mara@example.org');
    await userEvent.type(screen.getByLabelText('Password'), `${password}{Enter}`);
  };

  it('goes back to where the person was going, with nothing left of the one before', async () => {
    writeKept('owner', 'somebody-else');
    writeKept('invite', { email: 'theirs' });
    setParams({ back: '/cohorts' });
    const sent = serve({ 'POST /api/session': person('manager') });
    const { client } = renderWithQuery(<SignInScreen />);
    client.setQueryData(keys.herd(), 'their herd');
    await fill('a long sentence');
    await waitFor(() => expect(calls).toEqual([{ method: 'replace', href: '/cohorts' }]));
    expect(sent[0]?.body).toEqual({ email: 'mara@example.org', password: 'a long sentence' });
    expect(client.getQueryData(keys.herd())).toBeUndefined();
    expect(client.getQueryData(keys.me())).toMatchObject({ user: { name: 'Mara Field' } });
    expect(readKept('invite')).toBeUndefined();
  });

  it('keeps the forms of the same person', async () => {
    writeKept('owner', person('manager').user.id);
    writeKept('invite', { email: 'mine' });
    serve({ 'POST /api/session': person('manager') });
    renderWithQuery(<SignInScreen />);
    await fill('a long sentence');
    await waitFor(() => expect(calls).toHaveLength(1));
    expect(readKept('invite')).toEqual({ email: 'mine' });
  });

  it('says what is missing and sends nothing', async () => {
    const sent = serve({});
    renderWithQuery(<SignInScreen />);
    await userEvent.click(screen.getByRole('button', { name: 'Sign in' }));
    expect(screen.getByLabelText('E-mail')).toHaveAccessibleDescription('Fill in your e-mail address.');
    expect(screen.getByLabelText('Password')).toHaveAccessibleDescription('Fill in your password.');
    expect(sent).toEqual([]);
  });

  it('says that the password is wrong, and that the server is down', async () => {
    serve({ 'POST /api/session': () => refusal(401, 'unauthenticated', 'E-mail or password is not right.') });
    renderWithQuery(<SignInScreen />);
    await fill('wrong');
    expect(await screen.findByRole('alert')).toHaveTextContent('Not signed in. E-mail or password is not right.');
    noServer();
    await userEvent.click(screen.getByRole('button', { name: 'Sign in' }));
    await waitFor(() => expect(screen.getByRole('alert')).toHaveTextContent('Check the signal'));
    expect(screen.getByLabelText('E-mail')).toHaveValue('mara@example.org');
  });

  it.each([
    ['/herd/1', '/herd/1'],
    ['//evil.example', '/'],
    ['/\\evil.example', '/'],
    ['https://evil.example', '/'],
    [undefined, '/'],
  ])('leads from %s to %s', (back, to) => expect(backTo(back)).toBe(to));
});

describe('password reset', () => {
  it('answers the same for everybody', async () => {
    const sent = serve({ 'POST /api/password-resets': { ok: true } });
    renderWithQuery(<AskResetScreen />);
    await userEvent.type(screen.getByLabelText('E-mail'), 'who@example.org{Enter}');
    expect(await screen.findByText(/If who@example.org has an account/)).toBeInTheDocument();
    expect(sent).toHaveLength(1);
  });

  it('asks for twelve characters before it sends', async () => {
    setParams({ token: 'a-token-of-some-length' });
    const sent = serve({ 'POST /api/password-resets/a-token-of-some-length': { ok: true } });
    renderWithQuery(<SetPasswordScreen />);
    const field = screen.getByLabelText('New password');
    await userEvent.type(field, 'eleven chars'.slice(0, 11));
    await userEvent.click(screen.getByRole('button', { name: 'Set the password' }));
    expect(field).toHaveAccessibleDescription(/Use at least 12 characters/);
    expect(sent).toEqual([]);
    await userEvent.type(field, 's{Enter}');
    expect(await screen.findByText('The new password is set.')).toBeInTheDocument();
  });
});

describe('invitation', () => {
  const look = { email: 'new@example.org', role: 'staff', place: 'Brindle Gap', invitedBy: 'Mara Field' };

  it('makes an account with a name', async () => {
    setParams({ token: 'tok' });
    const sent = serve({
      'GET /api/invitations/tok': { ...look, known: false },
      'POST /api/invitations/tok': person('staff'),
    });
    renderWithQuery(<InvitationScreen />);
    expect(await screen.findByText('Mara Field invites new@example.org to Brindle Gap as staff.')).toBeInTheDocument();
    await userEvent.type(screen.getByLabelText('Your name'), 'Tom Rails');
    await userEvent.type(screen.getByLabelText('Password'), 'twelve letters{Enter}');
    await waitFor(() => expect(calls).toEqual([{ method: 'replace', href: '/' }]));
    expect(sent.at(-1)?.body).toEqual({ name: 'Tom Rails', password: 'twelve letters' });
  });

  it('asks somebody with an account for the password only', async () => {
    setParams({ token: 'tok' });
    const sent = serve({
      'GET /api/invitations/tok': { ...look, known: true },
      'POST /api/invitations/tok': person('staff'),
    });
    renderWithQuery(<InvitationScreen />);
    await userEvent.type(await screen.findByLabelText('Password'), 'short{Enter}');
    expect(screen.queryByLabelText('Your name')).toBeNull();
    await waitFor(() => expect(sent.at(-1)?.body).toEqual({ password: 'short' }));
  });

  it('says that an invitation is over, and what to do', async () => {
    setParams({ token: 'tok' });
    serve({ 'GET /api/invitations/tok': () => refusal(410, 'gone', 'This invitation has been used.') });
    renderWithQuery(<InvitationScreen />);
    expect(await screen.findByText('This invitation has been used.')).toBeInTheDocument();
    expect(screen.getByText('Ask who invited you for another invitation.')).toBeInTheDocument();
    expect(screen.queryByLabelText('Password')).toBeNull();
  });
});

describe('the frame', () => {
  const places = () => screen.getAllByRole('link').map((link) => link.textContent);

  it('has five tabs on a phone, and marks the one that is open', async () => {
    setPathname('/task/1');
    serve({ 'GET /api/me': person('manager') });
    renderWithQuery(<Frame />);
    expect(await screen.findByText('the place itself')).toBeInTheDocument();
    expect(places()).toEqual(['Go to the page', 'Today', 'Cohorts', 'Protocols', 'Herd', 'More']);
    expect(screen.getByRole('link', { name: 'Today' })).toHaveAttribute('aria-current', 'page');
    expect(screen.getByRole('link', { name: 'Cohorts' })).not.toHaveAttribute('aria-current');
    expect(screen.getByRole('main')).toContainElement(screen.getByText('the place itself'));
  });

  it('has all places at the left where it is wide', async () => {
    setWide(true);
    setPathname('/medicines');
    serve({ 'GET /api/me': person('manager') });
    renderWithQuery(<Frame />);
    await screen.findByText('the place itself');
    expect(places()).toEqual([
      'Go to the page',
      'Today',
      'Cohorts',
      'Calendar',
      'Protocols',
      'Herd',
      'Medicines',
      'People',
      'Mara Field',
    ]);
    expect(screen.getByRole('link', { name: 'Medicines' })).toHaveAttribute('aria-current', 'page');
    expect(screen.getByText('Brindle Gap')).toBeInTheDocument();
  });

  it('offers only what the person may do', async () => {
    setWide(true);
    setPathname('/calendar');
    serve({ 'GET /api/me': person('calendarOnly') });
    renderWithQuery(<Frame />);
    await screen.findByText('the place itself');
    expect(places()).toEqual(['Go to the page', 'Calendar', 'People', 'Mara Field']);
  });

  it('leads somebody who sees only the calendar from Today to the calendar', async () => {
    serve({ 'GET /api/me': person('calendarOnly') });
    renderWithQuery(<Frame />);
    expect(await screen.findByText('redirected to /calendar')).toBeInTheDocument();
  });

  it('leads nobody in particular to sign-in, and back afterwards', async () => {
    setPathname('/cohorts/7');
    serve({ 'GET /api/me': unauthenticated });
    renderWithQuery(<Frame />);
    expect(await screen.findByText('redirected to /sign-in?back=%2Fcohorts%2F7')).toBeInTheDocument();
  });

  it('says that the server is down instead of asking to sign in', async () => {
    noServer();
    renderWithQuery(<Frame />);
    expect(await screen.findByRole('alert')).toHaveTextContent('The server does not answer.');
    serve({ 'GET /api/me': person('manager') });
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }));
    expect(await screen.findByText('the place itself')).toBeInTheDocument();
  });
});

describe('More', () => {
  it('switches the property for every place', async () => {
    serve({ 'GET /api/me': person('manager', true) });
    renderWithQuery(<MoreScreen />);
    await userEvent.selectOptions(await screen.findByLabelText('Property'), 'Ballywhin');
    expect(screen.getByLabelText('Property')).toHaveDisplayValue('Ballywhin');
    await userEvent.selectOptions(screen.getByLabelText('Property'), 'All places');
    expect(screen.getByLabelText('Property')).toHaveDisplayValue('All places');
  });

  it('saves the reminders', async () => {
    const me = person('staff');
    const sent = serve({ 'GET /api/me': me, 'PATCH /api/me': me });
    renderWithQuery(<MoreScreen />);
    await userEvent.click(await screen.findByRole('checkbox', { name: 'In the morning' }));
    await userEvent.click(screen.getByRole('button', { name: 'Save the reminders' }));
    await waitFor(() =>
      expect(sent.at(-1)).toEqual({
        route: 'PATCH /api/me',
        body: { preferences: { ...me.preferences, morning: true } },
      }),
    );
  });

  it('forgets answers and forms at sign-out, and nothing when the server does not answer', async () => {
    writeKept('invite', { email: 'mine' });
    serve({ 'GET /api/me': person('staff') });
    const { client } = renderWithQuery(<MoreScreen />);
    const out = await screen.findByRole('button', { name: 'Sign out' });
    noServer();
    await userEvent.click(out);
    expect(await screen.findByRole('alert')).toHaveTextContent('Check the signal');
    expect(readKept('invite')).toEqual({ email: 'mine' });
    serve({ 'DELETE /api/session': { ok: true }, 'GET /api/me': unauthenticated });
    await userEvent.click(screen.getByRole('button', { name: 'Sign out' }));
    await waitFor(() => expect(calls).toEqual([{ method: 'replace', href: '/sign-in' }]));
    expect(readKept('invite')).toBeUndefined();
    expect(client.getQueryData(keys.me())).toBeUndefined();
  });
});
