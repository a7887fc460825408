import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { describe, expect, it, vi } from 'vitest';

import { Button } from '@/components/ui/Button';
import { Checkbox } from '@/components/ui/Checkbox';
import { DateTimeField, isWholeLocal } from '@/components/ui/DateTimeField';
import { Field } from '@/components/ui/Field';
import { Form } from '@/components/ui/Form';
import { PageTabs } from '@/components/ui/PageTabs';
import { RadioGroup, Segmented } from '@/components/ui/RadioGroup';
import { Select } from '@/components/ui/Select';

const user = () => userEvent.setup({ pointerEventsCheck: 0 });

describe('Button', () => {
  it('acts once for a click, for Enter and for Space', async () => {
    const act = vi.fn();
    render(<Button label="Start" onPress={act} />);
    const button = screen.getByRole('button', { name: 'Start' });
    await user().click(button);
    expect(act).toHaveBeenCalledTimes(1);
    button.focus();
    await user().keyboard('{Enter}');
    expect(act).toHaveBeenCalledTimes(2);
    await user().keyboard(' ');
    expect(act).toHaveBeenCalledTimes(3);
  });

  it('does nothing while busy, and says that it is working', async () => {
    const act = vi.fn();
    render(<Button label="Start" onPress={act} busy />);
    const button = screen.getByRole('button', { name: 'Start: working' });
    await user().click(button);
    expect(act).not.toHaveBeenCalled();
    expect(button).toHaveAttribute('aria-busy', 'true');
    expect(button).toHaveAttribute('aria-disabled', 'true');
  });

  it('reads with the button why it cannot be pressed', () => {
    render(
      <Button
        label="Start"
        onPress={() => undefined}
        disabled
        why="The authority covers 154 head, the cohort has 156."
      />,
    );
    expect(screen.getByRole('button', { name: 'Start' })).toHaveAccessibleDescription(/covers 154 head/);
  });
});

describe('fields', () => {
  it('ties hint and error to the control', () => {
    render(
      <Field label="Head" hint="As counted" error="Give a number." numeric value="x" onChange={() => undefined} />,
    );
    const input = screen.getByLabelText('Head');
    expect(input).toHaveAccessibleDescription('As counted Give a number.');
    expect(input).toBeInvalid();
    expect(input).toHaveAttribute('inputmode', 'decimal');
    expect(screen.getByRole('alert')).toHaveTextContent('Give a number.');
  });

  it('is sent by Enter from any field of a form', async () => {
    const send = vi.fn();
    render(
      <Form onSubmit={send}>
        <Field label="One" value="a" onChange={() => undefined} />
        <Field label="Two" value="b" onChange={() => undefined} />
      </Form>,
    );
    await user().type(screen.getByLabelText('Two'), '{Enter}');
    expect(send).toHaveBeenCalledTimes(1);
  });

  it('gives the chosen value of a list, and nothing for the placeholder', async () => {
    const choose = vi.fn();
    const options = [
      { value: 'cow', label: 'Cows' },
      { value: 'heifer', label: 'Heifers' },
    ] as const;
    render(<Select label="Class" value="" placeholder="Choose" onChange={choose} options={options} />);
    await user().selectOptions(screen.getByLabelText('Class'), 'Heifers');
    expect(choose).toHaveBeenCalledExactlyOnceWith('heifer');
    expect(screen.getByRole('option', { name: 'Choose' })).toBeDisabled();
  });

  it('changes a checkbox by click, Space and Enter', async () => {
    function Owner() {
      const [on, setOn] = useState(false);
      return <Checkbox label="Gloves on" checked={on} onChange={setOn} />;
    }
    render(<Owner />);
    const box = screen.getByRole('checkbox', { name: 'Gloves on' });
    await user().click(screen.getByText('Gloves on'));
    expect(box).toBeChecked();
    box.focus();
    await user().keyboard(' ');
    expect(box).not.toBeChecked();
    await user().keyboard('{Enter}');
    expect(box).toBeChecked();
  });

  it.each([
    ['RadioGroup', RadioGroup],
    ['Segmented', Segmented],
  ])('%s is one named group whose choice moves by arrow key', async (_, Group) => {
    function Owner() {
      const [value, setValue] = useState<'a' | 'b' | 'c'>('a');
      const options = [
        { value: 'a', label: 'First' },
        { value: 'b', label: 'Second' },
        { value: 'c', label: 'Third' },
      ] as const;
      return <Group label="Order" error="Look again." value={value} onChange={setValue} options={options} />;
    }
    render(<Owner />);
    expect(screen.getByRole('group', { name: 'Order' })).toHaveAccessibleDescription('Look again.');
    screen.getByRole('radio', { name: 'First' }).focus();
    await user().keyboard('{ArrowDown}');
    expect(screen.getByRole('radio', { name: 'Second' })).toBeChecked();
    expect(screen.getByRole('radio', { name: 'First' })).not.toBeChecked();
  });
});

describe('DateTimeField', () => {
  const Owner = ({ zone }: { zone: string }) => {
    const [value, setValue] = useState('2026-10-06T07:00');
    return (
      <>
        <DateTimeField label="Start" zone={zone} value={value} onChange={setValue} />
        <output>{value}</output>
      </>
    );
  };

  it('keeps the wall clock of the property and names its zone as it is on that date', async () => {
    render(<Owner zone="Australia/Sydney" />);
    // summer time in New South Wales begins on the first Sunday of October: 4 October 2026 (Standard Time Act 1987 (NSW), from memory)
    expect(screen.getByRole('group', { name: 'Start (AEDT)' })).toBeInTheDocument();
    const time = screen.getByLabelText('Start: time');
    await user().clear(time);
    expect(screen.getByRole('status')).toHaveTextContent(/^2026-10-06T$/);
    await user().type(time, '17:30');
    expect(screen.getByRole('status')).toHaveTextContent('2026-10-06T17:30');
  });

  it('knows a whole moment from half of one', () => {
    expect(isWholeLocal('2026-10-06T07:00')).toBe(true);
    expect(isWholeLocal('2026-10-06T')).toBe(false);
    expect(isWholeLocal('T07:00')).toBe(false);
  });
});

describe('PageTabs', () => {
  it('moves by arrow keys round the ends, and only the chosen tab is in the Tab order', async () => {
    function Owner() {
      const [value, setValue] = useState('one');
      const tabs = ['one', 'two', 'three'].map((name) => ({ value: name, label: name }));
      return (
        <PageTabs label="Parts" value={value} onChange={setValue} tabs={tabs}>
          <p>part {value}</p>
        </PageTabs>
      );
    }
    render(<Owner />);
    const tab = (name: string) => screen.getByRole('tab', { name });
    tab('one').focus();
    await user().keyboard('{ArrowLeft}');
    expect(tab('three')).toHaveFocus();
    expect(tab('three')).toHaveAttribute('aria-selected', 'true');
    expect(tab('one')).toHaveAttribute('tabindex', '-1');
    expect(screen.getByRole('tabpanel', { name: 'three' })).toHaveTextContent('part three');
    await user().keyboard('{Home}');
    expect(tab('one')).toHaveFocus();
  });
});
