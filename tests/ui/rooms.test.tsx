import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import axeCore from 'axe-core';
import { describe, expect, it } from 'vitest';

import { CalendarScreen } from '@/components/calendar/CalendarScreen';
import { AnimalScreen } from '@/components/herd/AnimalScreen';
import { HerdScreen } from '@/components/herd/HerdScreen';
import { ImportScreen } from '@/components/herd/ImportScreen';
import { MedicinesScreen } from '@/components/medicines/MedicinesScreen';
import { setParams } from '../support/expo-router';
import { brindleGap, person } from '../support/me';
import { refusal, renderWithQuery, serve } from '../support/render';
import { setWide } from '../support/ui-setup';

const at = `/api/properties/${brindleGap}`;
const animalId = '44444444-4444-4444-8444-444444444444';
const animal = {
  id: animalId,
  tag: '0412',
  eid: '982000123456789',
  class: 'heifer',
  breed: null,
  birth: '2024-08-03',
  sire: null,
  dam: null,
  lastCalving: null,
  lastService: null,
  knownEmpty: true,
  weightKg: 340,
  condition: null,
  paddock: 'Top',
  note: null,
  state: 'present',
  cohort: { id: animalId, name: 'Spring heifers' },
  updatedAt: '2026-10-01T00:00:00Z',
};
const detail = {
  ...animal,
  propertyId: brindleGap,
  events: [{ at: '2026-10-06T02:00:00Z', kind: 'record', title: 'Devices in', detail: 'done', by: 'Tom' }],
};
const counts = { create: 250, update: 1, skip: 0, refuse: 2 };
const rows = Array.from({ length: 253 }, (_, i) => ({
  line: i + 2,
  action: i < 2 ? 'refuse' : i === 2 ? 'update' : 'create',
  tag: String(i),
  eid: null,
  changes: i === 2 ? [{ field: 'paddock', from: null, to: 'Top' }] : [],
  problems: i < 2 ? [{ field: 'eid', message: 'Bad EID.' }] : [],
}));
const preview = {
  fileName: 'mob.csv',
  encoding: 'UTF-8',
  delimiter: ';',
  mapping: { Nr: 'tag', Calved: 'lastCalving' },
  counts,
  rows,
  columns: [
    { header: 'Nr', field: 'tag', sample: ['1'] },
    { header: 'Calved', field: 'lastCalving', sample: ['01/02/2026'] },
  ],
  questions: [{ kind: 'dateOrder', message: 'Day or month first?', columns: ['Calved'] }],
};
const axe = async () => {
  const found = await axeCore.run(document.body, {
    rules: { 'color-contrast': { enabled: false }, region: { enabled: false } },
  });
  return found.violations.map((v) => `${v.id}: ${v.nodes.map((n) => n.html.slice(0, 120)).join(' | ')}`);
};

describe('herd', () => {
  it.each([true, false])('list, wide %s', async (wide) => {
    setWide(wide);
    serve({ 'GET /api/me': person('manager', true), [`GET ${at}/animals`]: { items: [animal], next: null } });
    renderWithQuery(<HerdScreen />);
    expect(await screen.findByRole('link', { name: '0412' })).toBeInTheDocument();
    expect(screen.getByText('yes, known empty')).toBeInTheDocument();
    expect(screen.getAllByRole('heading', { level: 1 })).toHaveLength(1);
    expect(await axe()).toEqual([]);
  });
  it('says that nothing is open to who may not', async () => {
    serve({ 'GET /api/me': person('calendarOnly') });
    renderWithQuery(<HerdScreen />);
    expect(await screen.findByText('No herd is open to you')).toBeInTheDocument();
  });
  it('animal: history, and only changes are sent, never an unreadable figure', async () => {
    setParams({ id: animalId });
    const sent = serve({
      'GET /api/me': person('manager'),
      [`GET /api/animals/${animalId}`]: detail,
      [`PATCH /api/animals/${animalId}`]: { ...detail, weightKg: 351.5 },
    });
    renderWithQuery(<AnimalScreen />);
    expect(await screen.findByText('Devices in')).toBeInTheDocument();
    expect(screen.getByText('6 Oct 2026 13:00')).toBeInTheDocument();
    expect(await axe()).toEqual([]);
    await userEvent.click(screen.getByRole('button', { name: 'Edit' }));
    expect(await axe()).toEqual([]);
    const weight = screen.getByLabelText('Weight, kg');
    await userEvent.clear(weight);
    await userEvent.type(weight, 'abc');
    await userEvent.click(screen.getByRole('button', { name: 'Save' }));
    expect(screen.getByText(/Write a figure/)).toBeInTheDocument();
    await userEvent.clear(weight);
    await userEvent.type(weight, '351,5{Enter}');
    await waitFor(() =>
      expect(sent.filter((one) => one.route.startsWith('PATCH')).map((one) => one.body)).toEqual([{ weightKg: 351.5 }]),
    );
  });
  it('import keeps id and rows through answers and failures', { timeout: 60_000 }, async () => {
    setWide(true);
    let looks = 0;
    let commits = 0;
    const sent = serve({
      'GET /api/me': person('manager'),
      [`POST ${at}/animal-imports/preview`]: () =>
        ++looks === 2
          ? refusal(400, 'invalid', 'Bad.', [{ path: 'mapping', message: 'Two columns mean Tag.' }])
          : Response.json(looks > 2 ? { ...preview, questions: [] } : preview),
      [`POST ${at}/animal-imports`]: () =>
        ++commits === 1
          ? refusal(503, 'unavailable', 'Down.')
          : Response.json({ id: animalId, counts, animalIds: [animalId], repeated: true }),
    });
    renderWithQuery(<ImportScreen />);
    await userEvent.upload(
      await screen.findByLabelText('Choose a CSV file'),
      Object.assign(new File(['x'], 'mob.csv', { type: 'text/csv' }), {
        arrayBuffer: async () => new TextEncoder().encode('Nr;Calved').buffer,
      }),
    );
    expect(await screen.findByText(/separated by semicolons/)).toBeInTheDocument();
    expect(screen.getByText('Rows 1 to 100 of 253')).toBeInTheDocument();
    expect(await axe()).toEqual([]);
    await userEvent.selectOptions(screen.getByLabelText('Calved'), 'tag');
    expect(await screen.findByText('Two columns mean Tag.')).toBeInTheDocument();
    expect(screen.getByLabelText('Calved')).toHaveValue('tag');
    expect(screen.getByRole('button', { name: /Import 251 animals/ })).toHaveAttribute('aria-disabled', 'true');
    await userEvent.selectOptions(screen.getByLabelText('Calved'), 'lastCalving');
    await waitFor(() => expect(screen.queryByText('Day or month first?')).not.toBeInTheDocument());
    await userEvent.click(screen.getByText('Later rows'));
    expect(screen.getByText('Rows 101 to 200 of 253')).toBeInTheDocument();
    await userEvent.click(screen.getByText('Refused'));
    expect(screen.getByText('Rows 1 to 2 of 2')).toBeInTheDocument();
    await userEvent.click(screen.getByRole('button', { name: /Import 251 animals/ }));
    expect(await screen.findByText('Down.')).toBeInTheDocument();
    await userEvent.click(screen.getByRole('button', { name: /Import 251 animals/ }));
    expect(await screen.findByText(/nothing was done a second time/)).toBeInTheDocument();
    expect(new Set(sent.flatMap((one) => (one.body ? [(one.body as { id: string }).id] : []))).size).toBe(1);
    expect(sent.filter((one) => one.body)).toHaveLength(5);
    expect(await axe()).toEqual([]);
  });
});

const authority = {
  id: animalId,
  propertyId: brindleGap,
  cohortId: null,
  active: 'dinoprost',
  productId: null,
  product: null,
  amount: 25,
  unit: 'mg',
  route: 'im',
  classes: ['heifer'],
  head: 156,
  used: 40,
  validFrom: '2026-10-01',
  validTo: '2099-11-01',
  meatDays: 1,
  milkHours: null,
  directions: 'Once.',
  issuedBy: 'Ines Vet',
  issuedAt: '2026-10-01T00:00:00Z',
  withdrawnAt: null,
};
const product = {
  id: animalId,
  organisationId: animalId,
  name: 'PG 5',
  active: 'dinoprost',
  strength: 5,
  unit: 'mg',
  per: 'mL',
  packSize: 100,
  route: 'im',
  meatDays: 1,
  milkHours: 0,
  openDays: 28,
};
const batch = (number: string, expiry: string, broachedAt: string | null = null) => ({
  id: number,
  productId: animalId,
  product: 'PG 5',
  number,
  expiry,
  quantity: 100,
  used: 12.345,
  broachedAt,
});

describe('medicines', () => {
  it('balance, warnings, forms', async () => {
    const medicines = {
      products: [product],
      authorities: [authority],
      batches: [
        batch('B9', '2099-01-01'),
        batch('B1', '2020-01-01'),
        batch('B5', '2098-01-01', '2020-01-01T00:00:00Z'),
      ],
    };
    const property = {
      engagements: [
        { organisationId: animalId, organisation: 'Quillback', scope: 'veterinary', from: '2020-01-01', to: null },
      ],
    };
    const sent = serve({
      'GET /api/me': person('vet'),
      [`GET ${at}/medicines`]: medicines,
      [`GET ${at}`]: property,
      [`POST /api/authorities/${animalId}/withdraw`]: authority,
      [`POST ${at}/products`]: product,
    });
    renderWithQuery(<MedicinesScreen />);
    expect(await screen.findByText('40 of 156 head used')).toBeInTheDocument();
    expect(await axe()).toEqual([]);
    await userEvent.click(screen.getByRole('button', { name: /Withdraw the authority/ }));
    await userEvent.click(within(screen.getByRole('dialog')).getByRole('button', { name: 'Withdraw' }));
    await waitFor(() => expect(sent.some((one) => one.route.includes('withdraw'))).toBe(true));
    await userEvent.click(screen.getByRole('tab', { name: 'Product batches' }));
    expect(screen.getAllByRole('listitem').map((row) => /B\d/.exec(row.textContent ?? '')?.[0])).toEqual([
      'B1',
      'B5',
      'B9',
    ]);
    expect(screen.getByText('past its expiry')).toBeInTheDocument();
    expect(screen.getByText('opened longer than 28 days ago')).toBeInTheDocument();
    await userEvent.click(screen.getByRole('button', { name: 'Add a product batch' }));
    expect(await axe()).toEqual([]);
    await userEvent.click(screen.getByRole('button', { name: 'Save' }));
    expect(screen.getByText('Choose one.')).toBeInTheDocument();
    await userEvent.click(screen.getByRole('button', { name: 'Cancel' }));
    await userEvent.click(screen.getByRole('tab', { name: 'Products' }));
    await userEvent.click(screen.getByRole('button', { name: 'Add a product' }));
    expect(await axe()).toEqual([]);
    await userEvent.type(screen.getByLabelText('Name'), 'PG 12{Enter}');
    expect(screen.getByText('Give the strength, above 0.')).toBeInTheDocument();
    await userEvent.type(screen.getByLabelText('Strength'), '12,5{Enter}');
    await waitFor(() =>
      expect(sent.find((one) => one.route === `POST ${at}/products`)?.body).toMatchObject({
        name: 'PG 12',
        strength: 12.5,
        organisationId: animalId,
        packSize: null,
      }),
    );
  });
});

describe('calendar', () => {
  const monday = (week: number) => {
    const now = new Date();
    const day = new Date(now.getTime() + 11 * 3_600_000);
    return new Date(
      Date.UTC(day.getUTCFullYear(), day.getUTCMonth(), day.getUTCDate() - ((day.getUTCDay() + 6) % 7) + 7 * week),
    )
      .toISOString()
      .slice(0, 10);
  };
  const task = {
    id: animalId,
    propertyId: brindleGap,
    property: 'Brindle Gap',
    zone: 'Australia/Sydney',
    cohortId: animalId,
    cohort: 'x',
    groupId: 'g',
    group: 'Mob 1',
    visitId: 'v',
    title: 'Devices in',
    occurrence: 1,
    yarded: true,
    dueAt: `${monday(0)}T02:00:00.000Z`,
    windowFrom: '',
    windowTo: '',
    state: 'planned',
    head: 156,
    done: 0,
    steps: [
      { id: 's', kind: 'deviceIn' },
      { id: 't', kind: 'gnrh' },
    ],
  };
  it.each([
    ['manager', true, true],
    ['calendarOnly', false, false],
  ] as const)('%s', async (role, wide, opens) => {
    setWide(wide);
    serve({
      'GET /api/me': person(role),
      'GET /api/calendar': { tasks: [task], holidays: [{ propertyId: brindleGap, date: monday(0), name: 'Show Day' }] },
      [`GET ${at}`]: { weekendDays: [5] },
    });
    renderWithQuery(<CalendarScreen />);
    expect(await screen.findByText('Holiday: Show Day')).toBeInTheDocument();
    expect(screen.getByText(/Mob 1 · 156 head/)).toBeInTheDocument();
    expect(screen.queryByRole('link', { name: 'Devices in' }) !== null).toBe(opens);
    await waitFor(() => expect(screen.getAllByText('Weekend')).toHaveLength(1));
    expect(await axe()).toEqual([]);
    await userEvent.click(screen.getByRole('button', { name: 'Later week' }));
    await waitFor(() => expect(screen.queryByText('Holiday: Show Day')).not.toBeInTheDocument());
    await userEvent.click(screen.getByRole('button', { name: 'This week' }));
    expect(await screen.findByText('Holiday: Show Day')).toBeInTheDocument();
  });
});
