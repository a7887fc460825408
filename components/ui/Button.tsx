import { useId } from 'react';
import { Pressable, StyleSheet, View, type StyleProp, type ViewStyle } from 'react-native';

import { t } from '@/shared/messages';
import { color, font, space, target } from '../theme/tokens';
import { Text } from './Text';

export type ButtonKind = 'primary' | 'plain' | 'quiet' | 'danger';

export interface ButtonProps {
  label: string;
  onPress: () => void;
  /** primary is hi-vis and stands at most once on a page: the one next action. Default plain. */
  kind?: ButtonKind;
  /** 64 is for the crush. */
  size?: 48 | 64;
  busy?: boolean;
  disabled?: boolean;
  /** Why it can't be pressed now; shown under the button and read with it. */
  why?: string | undefined;
  /** Longer name for screen readers, where the label alone is not enough, such as "Undo the record of 0412". */
  accessibleLabel?: string;
  /** For a button that opens something. */
  expanded?: boolean;
  fill?: boolean;
  style?: StyleProp<ViewStyle>;
}

/** Something that acts here. What leads to another place is a Link or LinkButton. */
export function Button(props: ButtonProps) {
  const {
    label,
    onPress,
    kind = 'plain',
    size = 48,
    busy = false,
    disabled = false,
    why,
    accessibleLabel,
    fill,
  } = props;
  const whyId = useId();
  const off = disabled || busy;
  return (
    <View style={[fill ? styles.fill : styles.fit, props.style]}>
      <Pressable
        role="button"
        aria-label={busy ? t('ui.busy', { label: accessibleLabel ?? label }) : (accessibleLabel ?? label)}
        aria-busy={busy}
        aria-disabled={off}
        {...(props.expanded === undefined ? {} : { 'aria-expanded': props.expanded })}
        {...(why ? { 'aria-describedby': whyId } : {})}
        disabled={off}
        onPress={onPress}
        style={({ pressed }) => [
          styles.base,
          { minHeight: size },
          kinds[kind],
          pressed && styles.pressed,
          off && styles.off,
        ]}
      >
        <Text
          variant={size === 64 ? 'heading' : 'body'}
          strong={size === 48}
          align="center"
          aria-hidden
          style={[
            size === 48 && styles.word,
            { color: off ? color.quiet : words[kind] },
            kind === 'quiet' && styles.underlined,
          ]}
        >
          {busy ? t('ui.busyShort') : label}
        </Text>
      </Pressable>
      {why ? (
        <Text variant="small" tone="quiet" nativeID={whyId} style={styles.why}>
          {why}
        </Text>
      ) : null}
    </View>
  );
}

const words: Record<ButtonKind, string> = {
  primary: color.onVis,
  plain: color.ink,
  quiet: color.ink,
  danger: color.stop,
};

const kinds = StyleSheet.create({
  primary: { backgroundColor: color.vis, borderColor: color.onVis },
  plain: { backgroundColor: color.raised, borderColor: color.ink },
  quiet: { borderColor: 'transparent', paddingHorizontal: space.s },
  danger: { backgroundColor: color.raised, borderColor: color.stop },
});

const styles = StyleSheet.create({
  fit: { alignSelf: 'flex-start', alignItems: 'flex-start', maxWidth: '100%' },
  fill: { alignSelf: 'stretch' },
  base: {
    minWidth: target.normal,
    paddingHorizontal: 20,
    paddingVertical: 6,
    borderWidth: 2,
    borderRadius: 4,
    justifyContent: 'center',
    alignItems: 'center',
  },
  word: { fontFamily: font.bodyBold },
  underlined: { textDecorationLine: 'underline' },
  pressed: { transform: [{ translateY: 1 }] },
  off: { backgroundColor: color.sunk, borderColor: color.rail },
  why: { marginTop: space.xs },
});
