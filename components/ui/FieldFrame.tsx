import { useId, type ReactNode } from 'react';
import { View } from 'react-native';

import { Text } from './Text';
import { SeverityMark } from './SeverityMark';

export interface FieldFrameProps {
  label: string;
  hint?: string | undefined;
  /** What is wrong and what to do; announced, and tied to the control. */
  error?: string | undefined;
  optional?: boolean;
}

/** What a control needs so that its hint and error are read with it. */
export interface ControlProps {
  id: string;
  'aria-describedby'?: string;
  'aria-invalid'?: boolean;
}

/** Label above, control, then hint and error: the frame of every field. */
export function FieldFrame({
  label,
  hint,
  error,
  children,
}: FieldFrameProps & { children: (props: ControlProps) => ReactNode }) {
  const id = useId();
  const described = [hint ? `${id}h` : '', error ? `${id}e` : ''].filter(Boolean).join(' ');
  return (
    <View style={{ gap: 4, minWidth: 0 }}>
      <label htmlFor={id}>
        <Text strong>{label}</Text>
      </label>
      {hint ? (
        <Text variant="small" tone="quiet" nativeID={`${id}h`}>
          {hint}
        </Text>
      ) : null}
      {children({
        id,
        ...(described ? { 'aria-describedby': described } : {}),
        ...(error ? { 'aria-invalid': true } : {}),
      })}
      {error ? <FieldError id={`${id}e`} message={error} /> : null}
    </View>
  );
}

export const FieldError = ({ id, message }: { id: string; message: string }) => (
  <View style={{ flexDirection: 'row', gap: 6, alignItems: 'flex-start' }}>
    <SeverityMark severity="stop" size={18} />
    <Text variant="small" tone="stop" strong role="alert" nativeID={id} style={{ flexShrink: 1 }}>
      {message}
    </Text>
  </View>
);
