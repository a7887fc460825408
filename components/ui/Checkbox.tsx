import { useId } from 'react';
import { View } from 'react-native';

import { FieldError } from './FieldFrame';
import { Text } from './Text';

interface CheckboxProps {
  label: string;
  checked: boolean;
  onChange: (checked: boolean) => void;
  hint?: string | undefined;
  error?: string | undefined;
  disabled?: boolean;
  /** Keeps the label for screen readers only, as in the cells of a table. */
  bare?: boolean;
}

/** Yes or no. Space and Enter both change it. */
export function Checkbox({ label, checked, onChange, hint, error, disabled = false, bare = false }: CheckboxProps) {
  const id = useId();
  const described = [hint ? `${id}h` : '', error ? `${id}e` : ''].filter(Boolean).join(' ');
  return (
    <View>
      <label className="choice">
        <input
          type="checkbox"
          checked={checked}
          disabled={disabled}
          {...(described ? { 'aria-describedby': described } : {})}
          {...(error ? { 'aria-invalid': true } : {})}
          onChange={(event) => onChange(event.target.checked)}
          onKeyDown={(event) => {
            if (event.key !== 'Enter') return;
            event.preventDefault();
            onChange(!checked);
          }}
        />
        {bare ? <span className="hidden-words">{label}</span> : <Text style={{ flexShrink: 1 }}>{label}</Text>}
      </label>
      {hint ? (
        <Text variant="small" tone="quiet" nativeID={`${id}h`} style={{ paddingLeft: 38 }}>
          {hint}
        </Text>
      ) : null}
      {error ? <FieldError id={`${id}e`} message={error} /> : null}
    </View>
  );
}
