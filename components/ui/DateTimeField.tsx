import { useId } from 'react';

import { t } from '@/shared/messages';
import { zoneName } from '@/shared/when';
import { FieldError, FieldFrame, type FieldFrameProps } from './FieldFrame';
import { Text } from './Text';

interface DateTimeFieldProps extends FieldFrameProps {
  /** Wall clock of the property, `YYYY-MM-DDTHH:MM`; a half that is not filled in yet is empty (`2026-10-06T`). */
  value: string;
  onChange: (value: string) => void;
  /** IANA zone of the property; its name stands in the label. */
  zone: string;
  /** Least and last date, `YYYY-MM-DD`. */
  min?: string;
  max?: string;
  disabled?: boolean;
}

/** True when both halves are there. */
export const isWholeLocal = (value: string): boolean => /^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}$/.test(value);

/** Date and time in the property's zone, whatever zone the person is in. */
export function DateTimeField(props: DateTimeFieldProps) {
  const { label, value, onChange, zone, hint, error, min, max, disabled } = props;
  const id = useId();
  const [date = '', time = ''] = value.split('T');
  // near the date itself, since the short name changes with the clocks
  const near = Date.parse(`${date || '2026-01-01'}T12:00:00Z`);
  const described = [hint ? `${id}h` : '', error ? `${id}e` : ''].filter(Boolean).join(' ');
  const shared = {
    className: 'control',
    disabled,
    ...(described ? { 'aria-describedby': described } : {}),
    ...(error ? { 'aria-invalid': true } : {}),
  };
  return (
    <fieldset style={{ border: 0, margin: 0, padding: 0, minWidth: 0 }}>
      <legend style={{ padding: 0, marginBottom: 4 }}>
        <Text strong>{t('ui.inZone', { label, zone: zoneName(Number.isNaN(near) ? 0 : near, zone) })}</Text>
      </legend>
      {hint ? (
        <Text variant="small" tone="quiet" nativeID={`${id}h`}>
          {hint}
        </Text>
      ) : null}
      <div style={{ display: 'flex', gap: 8, flexWrap: 'wrap' }}>
        <input
          {...shared}
          type="date"
          aria-label={t('ui.dateOf', { label })}
          style={{ flex: '2 1 160px' }}
          value={date}
          min={min}
          max={max}
          onChange={(event) => onChange(`${event.target.value}T${time}`)}
        />
        <input
          {...shared}
          type="time"
          aria-label={t('ui.timeOf', { label })}
          style={{ flex: '1 1 110px' }}
          value={time}
          onChange={(event) => onChange(`${date}T${event.target.value.slice(0, 5)}`)}
        />
      </div>
      {error ? <FieldError id={`${id}e`} message={error} /> : null}
    </fieldset>
  );
}

interface OneProps extends FieldFrameProps {
  value: string;
  onChange: (value: string) => void;
  min?: string;
  max?: string;
  disabled?: boolean;
}

const one = (type: 'date' | 'time') =>
  function One({ value, onChange, min, max, disabled, ...frame }: OneProps) {
    return (
      <FieldFrame {...frame}>
        {(control) => (
          <input
            {...control}
            className="control"
            type={type}
            value={value}
            min={min}
            max={max}
            disabled={disabled}
            onChange={(event) => onChange(event.target.value)}
          />
        )}
      </FieldFrame>
    );
  };

/** A local date, `YYYY-MM-DD`. */
export const DateField = one('date');
/** A clock time, `HH:MM`. */
export const TimeField = one('time');
