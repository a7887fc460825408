import { FieldFrame, type FieldFrameProps } from './FieldFrame';

export interface Choice<T extends string> {
  value: T;
  label: string;
  hint?: string;
  disabled?: boolean;
}

export interface SelectProps<T extends string> extends FieldFrameProps {
  value: T | '';
  onChange: (value: T) => void;
  options: readonly Choice<T>[];
  /** Shown while nothing is chosen; can't be chosen again. */
  placeholder?: string;
  disabled?: boolean;
}

/** One of many, by the platform's own list. */
export function Select<T extends string>({
  value,
  onChange,
  options,
  placeholder,
  disabled,
  ...frame
}: SelectProps<T>) {
  return (
    <FieldFrame {...frame}>
      {(control) => (
        <select
          {...control}
          className="control"
          value={value}
          disabled={disabled}
          onChange={(event) => {
            const chosen = options.find((option) => option.value === event.target.value);
            if (chosen) onChange(chosen.value);
          }}
        >
          {placeholder !== undefined || value === '' ? (
            <option value="" disabled>
              {placeholder ?? ''}
            </option>
          ) : null}
          {options.map((option) => (
            <option key={option.value} value={option.value} disabled={option.disabled}>
              {option.label}
            </option>
          ))}
        </select>
      )}
    </FieldFrame>
  );
}
