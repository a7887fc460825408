import type { Ref } from 'react';

import { FieldFrame, type FieldFrameProps } from './FieldFrame';

export interface FieldProps extends FieldFrameProps {
  value: string;
  onChange: (value: string) => void;
  multiline?: boolean;
  /** Figures: brings the number keypad and a decimal point; the value stays text. */
  numeric?: boolean;
  kind?: 'text' | 'email' | 'password' | 'search';
  autoComplete?: string;
  placeholder?: string;
  disabled?: boolean;
  maxLength?: number;
  rows?: number;
  onBlur?: () => void;
  inputRef?: Ref<HTMLInputElement>;
}

/** One line of text, several lines, or a figure. */
export function Field(props: FieldProps) {
  const {
    value,
    onChange,
    multiline,
    numeric,
    kind = 'text',
    autoComplete,
    placeholder,
    disabled,
    maxLength,
    rows,
    onBlur,
  } = props;
  return (
    <FieldFrame label={props.label} hint={props.hint} error={props.error}>
      {(control) => {
        const shared = { ...control, value, disabled, maxLength, placeholder, onBlur, className: 'control' };
        if (multiline) return <textarea {...shared} rows={rows ?? 3} onChange={(e) => onChange(e.target.value)} />;
        return (
          <input
            {...shared}
            ref={props.inputRef}
            type={kind}
            autoComplete={autoComplete ?? 'off'}
            autoCapitalize={kind === 'text' ? 'sentences' : 'none'}
            onChange={(e) => onChange(e.target.value)}
            {...(numeric ? { inputMode: 'decimal' as const } : {})}
          />
        );
      }}
    </FieldFrame>
  );
}
