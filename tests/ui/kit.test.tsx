import { act, render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { afterEach, describe, expect, it, vi } from 'vitest';

import { Button } from '@/components/ui/Button';
import { leftWords, TimeLeft } from '@/components/ui/clock';
import { DataTable, type Column } from '@/components/ui/DataTable';
import { Confirm, Dialog } from '@/components/ui/Dialog';
import { FindingList } from '@/components/ui/Finding';
import { stepGlyphs } from '@/components/ui/marks/glyphs';
import { Notice } from '@/components/ui/Notice';
import { Progress } from '@/components/ui/Progress';
import { RailList, RailRow } from '@/components/ui/Rail';
import { Screen } from '@/components/ui/Screen';
import { ErrorState, Loaded } from '@/components/ui/states';
import { TagChip } from '@/components/ui/TagChip';
import { toast, Toasts } from '@/components/ui/toast';
import { TreatmentMark } from '@/components/ui/TreatmentMark';
import { ApiFailure } from '@/lib/api';
import { stepKinds } from '@/protocols/types';
import { setWide } from '../support/ui-setup';

afterEach(() => vi.useRealTimers());

describe('Dialog', () => {
  function Owner({ onConfirm = () => undefined }: { onConfirm?: () => void }) {
    const [open, setOpen] = useState(false);
    return (
      <>
        <Button label="Open" onPress={() => setOpen(true)} />
        <Confirm
          open={open}
          title="Cancel the cohort?"
          body="156 head leave the calendar."
          confirmLabel="Cancel it"
          danger
          onConfirm={onConfirm}
          onClose={() => setOpen(false)}
        />
      </>
    );
  }

  it('takes the focus, keeps it, closes by Escape, and gives it back', async () => {
    const user = userEvent.setup();
    render(<Owner />);
    await user.click(screen.getByRole('button', { name: 'Open' }));
    const dialog = screen.getByRole('dialog', { name: 'Cancel the cohort?' });
    expect(dialog).toContainElement(document.activeElement as HTMLElement);
    for (const key of [
      '{Tab}',
      '{Tab}',
      '{Tab}',
      '{Shift>}{Tab}{/Shift}',
      '{Shift>}{Tab}{/Shift}',
      '{Shift>}{Tab}{/Shift}',
    ]) {
      await user.keyboard(key);
      expect(dialog).toContainElement(document.activeElement as HTMLElement);
    }
    await user.keyboard('{Escape}');
    expect(screen.queryByRole('dialog')).toBeNull();
    expect(screen.getByRole('button', { name: 'Open' })).toHaveFocus();
  });

  it('acts only by its own button', async () => {
    const onConfirm = vi.fn();
    const user = userEvent.setup();
    render(<Owner onConfirm={onConfirm} />);
    await user.click(screen.getByRole('button', { name: 'Open' }));
    await user.click(screen.getByRole('button', { name: 'Cancel' }));
    expect(onConfirm).not.toHaveBeenCalled();
    await user.click(screen.getByRole('button', { name: 'Open' }));
    await user.click(screen.getByRole('button', { name: 'Cancel it' }));
    expect(onConfirm).toHaveBeenCalledTimes(1);
  });

  it('is not there while it is closed', () => {
    render(<Dialog open={false} onClose={() => undefined} title="Hidden" />);
    expect(screen.queryByText('Hidden')).toBeNull();
  });
});

describe('notices and toasts', () => {
  it('interrupts for what is wrong and waits with what is good', () => {
    render(
      <>
        <Notice tone="stop">Wrong straw.</Notice>
        <Notice tone="good">Saved.</Notice>
      </>,
    );
    expect(screen.getByRole('alert')).toHaveTextContent('Wrong straw.');
    expect(screen.getByRole('status')).toHaveTextContent('Saved.');
  });

  it('says what was done in a region that was there before, can be taken back, and goes', async () => {
    vi.useFakeTimers({ shouldAdvanceTime: true });
    const undo = vi.fn();
    const user = userEvent.setup({ advanceTimers: vi.advanceTimersByTime });
    render(<Toasts />);
    const region = screen.getByRole('status');
    expect(region).toBeEmptyDOMElement();
    act(() => toast('0412 done', undo));
    expect(region).toHaveTextContent('0412 done');
    await user.click(screen.getByRole('button', { name: 'Undo' }));
    expect(undo).toHaveBeenCalledTimes(1);
    expect(region).toBeEmptyDOMElement();
    act(() => toast('Saved'));
    act(() => void vi.advanceTimersByTime(6_001));
    expect(region).toBeEmptyDOMElement();
  });
});

describe('lists and tables', () => {
  interface Row {
    tag: string;
    kg: number;
  }
  const rows: Row[] = [
    { tag: '0412', kg: 318 },
    { tag: '0427', kg: 331 },
  ];
  const columns: Column<Row>[] = [
    { key: 'tag', title: 'Tag', primary: true, cell: (row) => row.tag },
    { key: 'kg', title: 'Weight', end: true, cell: (row) => `${row.kg} kg` },
  ];
  const table = (
    <DataTable
      caption="Heifers"
      columns={columns}
      rows={rows}
      rowKey={(row) => row.tag}
      href={(row) => `/herd/${row.tag}` as never}
    />
  );

  it('is a table with column and row headers where it is wide', () => {
    setWide(true);
    render(table);
    const found = screen.getByRole('table', { name: 'Heifers' });
    expect(
      within(found)
        .getAllByRole('columnheader')
        .map((cell) => cell.textContent),
    ).toEqual(['Tag', 'Weight']);
    const row = within(found).getByRole('rowheader', { name: '0427' }).closest('tr');
    expect(row).toHaveTextContent('331 kg');
    expect(screen.getByRole('link', { name: '0427' })).toHaveAttribute('href', '/herd/0427');
  });

  it('stacks the same rows on a phone, each figure with its name', () => {
    render(table);
    expect(screen.queryByRole('table')).toBeNull();
    const items = within(screen.getByRole('list', { name: 'Heifers' })).getAllByRole('listitem');
    expect(items.map((item) => item.textContent)).toEqual(['0412Weight318 kg', '0427Weight331 kg']);
  });

  it('changes over when the window is widened', () => {
    render(table);
    act(() => setWide(true));
    expect(screen.getByRole('table')).toBeInTheDocument();
  });

  it('makes a row a link or a button, and keeps what stands below out of it', async () => {
    const press = vi.fn();
    render(
      <RailList label="Work">
        <RailRow title="Devices out" href="/task/1" selected />
        <RailRow title="Heat round" onPress={press}>
          <Button label="Start" onPress={() => undefined} />
        </RailRow>
        <RailRow title="Nothing due" />
      </RailList>,
    );
    const link = screen.getByRole('link', { name: 'Devices out' });
    expect(link).toHaveAttribute('href', '/task/1');
    expect(link).toHaveAttribute('aria-current', 'page');
    await userEvent.click(screen.getByRole('button', { name: 'Start' }));
    expect(press).not.toHaveBeenCalled();
    await userEvent.click(screen.getByRole('button', { name: 'Heat round' }));
    expect(press).toHaveBeenCalledTimes(1);
    expect(screen.getAllByRole('listitem')).toHaveLength(3);
  });
});

describe('findings', () => {
  const finding = (severity: 'stop' | 'warn' | 'note', message: string) => ({
    code: 'x',
    severity,
    steps: [],
    params: {},
    message,
    remedy: `do about ${message}`,
  });

  it('puts stops first and says the word of each, not only its colour', () => {
    render(<FindingList findings={[finding('note', 'n'), finding('stop', 's'), finding('warn', 'w')]} />);
    const words = screen.getAllByRole('listitem').map((item) => item.textContent);
    expect(words).toEqual(['Stop. sdo about s', 'Warning. wdo about w', 'Note. ndo about n']);
  });

  it('draws each severity in a shape of its own', () => {
    const { container } = render(
      <FindingList findings={[finding('note', 'n'), finding('stop', 's'), finding('warn', 'w')]} />,
    );
    const shapes = [...container.querySelectorAll('svg')].map((svg) =>
      [...svg.querySelectorAll('rect, path, circle')].map((e) => e.tagName),
    );
    expect(shapes).toEqual([['rect'], ['path'], ['circle']]);
  });
});

describe('marks', () => {
  it('draws every kind of step, no two alike', () => {
    const drawings = stepKinds.map((kind) => JSON.stringify(stepGlyphs[kind]));
    expect(new Set(drawings).size).toBe(stepKinds.length);
  });

  it('is silent, and stands with its word', () => {
    const { container } = render(<TreatmentMark kind="deviceOut" withLabel />);
    expect(screen.getByText('Device out')).toBeInTheDocument();
    expect(container.querySelector('svg')?.closest('[aria-hidden="true"]')).not.toBeNull();
  });

  it('reads a tag as a tag', () => {
    render(<TagChip tag="0427" size="l" />);
    expect(screen.getByRole('img', { name: 'tag 0427' })).toHaveTextContent('0427');
  });

  it('says how far something has come', () => {
    render(<Progress label="Recorded" value={38} max={52} words="38 of 52" />);
    const bar = screen.getByRole('progressbar', { name: 'Recorded' });
    expect(bar).toHaveAttribute('aria-valuenow', '38');
    expect(bar).toHaveAttribute('aria-valuemax', '52');
    expect(bar).toHaveAttribute('aria-valuetext', '38 of 52');
  });
});

describe('states', () => {
  it('says that the server is down, and tries again', async () => {
    const retry = vi.fn();
    render(<ErrorState error={new ApiFailure('unreachable', 'Check the signal.')} onRetry={retry} />);
    expect(screen.getByRole('alert')).toHaveTextContent('The server does not answer. Check the signal.');
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }));
    expect(retry).toHaveBeenCalledTimes(1);
  });

  it('keeps showing what is here when asking again fails', () => {
    render(
      <Loaded query={{ data: 'old answer', error: new ApiFailure('unreachable', 'x'), refetch: () => undefined }}>
        {(data) => <p>{data}</p>}
      </Loaded>,
    );
    expect(screen.getByText('old answer')).toBeInTheDocument();
    expect(screen.queryByRole('alert')).toBeNull();
  });

  it('never shows the words of an error that is not ours', () => {
    render(<ErrorState error={new TypeError('x is undefined')} />);
    expect(screen.getByRole('alert')).not.toHaveTextContent('undefined');
  });
});

describe('Screen and clock', () => {
  it('has one h1, names the document, and takes the opening shell away', () => {
    const shell = document.createElement('div');
    shell.id = 'shell';
    document.body.append(shell);
    render(<Screen title="Herd" back={{ href: '/', label: 'Today' }} />);
    expect(screen.getByRole('heading', { level: 1 })).toHaveTextContent('Herd');
    expect(document.title).toBe('Herd · Yardbell');
    expect(document.getElementById('shell')).toBeNull();
  });

  it('counts down to a window in words', () => {
    const now = Date.UTC(2026, 9, 6, 3, 0);
    expect(leftWords(now + 65 * 60_000, now)).toBe('in 1 h 05');
    expect(leftWords(now - 20 * 60_000, now)).toBe('20 min ago');
    expect(leftWords(now, now)).toBe('now');
  });

  it('goes on by itself', () => {
    vi.useFakeTimers({ now: Date.UTC(2026, 9, 6, 3, 0) });
    render(<TimeLeft until={Date.UTC(2026, 9, 6, 3, 10)} />);
    expect(screen.getByText('in 10 min')).toBeInTheDocument();
    act(() => void vi.advanceTimersByTime(4 * 60_000));
    expect(screen.getByText('in 6 min')).toBeInTheDocument();
  });
});
