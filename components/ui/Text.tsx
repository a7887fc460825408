import type { ReactNode } from 'react';
import { StyleSheet, Text as NativeText, type StyleProp, type TextStyle } from 'react-native';

import { color, font, type, type TypeName } from '../theme/tokens';

export type Tone = 'ink' | 'quiet' | 'stop' | 'warn' | 'good' | 'note' | 'onVis' | 'page';

export interface TextProps {
  children?: ReactNode;
  /** Default body. */
  variant?: TypeName;
  /** Makes it a heading of this level; `title` without a level is level 1. */
  level?: 1 | 2 | 3 | 4;
  tone?: Tone;
  strong?: boolean;
  align?: 'left' | 'center' | 'right';
  numberOfLines?: number;
  style?: StyleProp<TextStyle>;
  nativeID?: string;
  role?: 'status' | 'alert';
  'aria-hidden'?: boolean;
}

/** All words that people read. Figures are tabular in every variant. */
export function Text({ variant = 'body', level, tone = 'ink', strong, align, style, role, ...rest }: TextProps) {
  const headingLevel = level ?? (variant === 'title' ? 1 : undefined);
  const heading = headingLevel ? { role: 'heading' as const, 'aria-level': headingLevel } : {};
  return (
    <NativeText
      {...rest}
      {...heading}
      {...(role ? { role } : {})}
      style={[
        styles.base,
        type[variant],
        { color: color[tone] },
        strong && styles.strong,
        align && { textAlign: align },
        style,
      ]}
    />
  );
}

const styles = StyleSheet.create({
  base: { fontVariant: ['tabular-nums'], margin: 0 },
  strong: { fontFamily: font.bodyBold, fontWeight: '700' },
});
