import { useId, type ReactNode } from 'react';

import { FieldError } from './FieldFrame';
import type { Choice } from './Select';
import { Text } from './Text';

export interface ChoiceProps<T extends string> {
  label: string;
  value: T | '';
  onChange: (value: T) => void;
  options: readonly Choice<T>[];
  hint?: string | undefined;
  error?: string | undefined;
  disabled?: boolean;
  /** Keeps the label for screen readers only. */
  hideLabel?: boolean;
}

interface FrameProps {
  id: string;
  label: string;
  hint?: string | undefined;
  error?: string | undefined;
  hideLabel?: boolean | undefined;
  children: ReactNode;
}

/** A set of choices under one label; without one checked, the group itself bears the error. */
function ChoiceFrame({ id, label, hint, error, hideLabel, children }: FrameProps) {
  const described = [hint ? `${id}h` : '', error ? `${id}e` : ''].filter(Boolean).join(' ');
  return (
    <fieldset
      {...(described ? { 'aria-describedby': described } : {})}
      style={{ border: 0, margin: 0, padding: 0, minWidth: 0 }}
    >
      <legend style={{ padding: 0, marginBottom: 4 }} className={hideLabel ? 'hidden-words' : ''}>
        <Text strong>{label}</Text>
      </legend>
      {hint ? (
        <Text variant="small" tone="quiet" nativeID={`${id}h`}>
          {hint}
        </Text>
      ) : null}
      {children}
      {error ? <FieldError id={`${id}e`} message={error} /> : null}
    </fieldset>
  );
}

/** One of a few, each on its own line with room for a hint. Arrow keys move the choice. */
export function RadioGroup<T extends string>(props: ChoiceProps<T>) {
  const { value, onChange, options, disabled } = props;
  const id = useId();
  return (
    <ChoiceFrame id={id} label={props.label} hint={props.hint} error={props.error} hideLabel={props.hideLabel}>
      {options.map((option) => (
        <label className="choice" key={option.value}>
          <input
            type="radio"
            name={id}
            checked={option.value === value}
            disabled={disabled || option.disabled}
            onChange={() => onChange(option.value)}
          />
          <span style={{ padding: '6px 0' }}>
            <Text>{option.label}</Text>
            {option.hint ? (
              <Text variant="small" tone="quiet" style={{ display: 'flex' }}>
                {option.hint}
              </Text>
            ) : null}
          </span>
        </label>
      ))}
    </ChoiceFrame>
  );
}

/** One of two to five short words side by side. The same keys as RadioGroup. */
export function Segmented<T extends string>(props: ChoiceProps<T>) {
  const { value, onChange, options, disabled } = props;
  const id = useId();
  return (
    <ChoiceFrame id={id} label={props.label} hint={props.hint} error={props.error} hideLabel={props.hideLabel}>
      <div className="segments">
        {options.map((option) => (
          <label key={option.value} data-chosen={option.value === value}>
            <input
              type="radio"
              name={id}
              checked={option.value === value}
              disabled={disabled || option.disabled}
              onChange={() => onChange(option.value)}
            />
            <Text strong style={{ color: 'inherit' }}>
              {option.label}
            </Text>
          </label>
        ))}
      </div>
    </ChoiceFrame>
  );
}
