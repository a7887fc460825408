import { Link as RouterLink, type Href } from 'expo-router';
import type { ReactNode } from 'react';
import { StyleSheet } from 'react-native';

import { color, font, space, target, type } from '../theme/tokens';

interface LinkProps {
  href: Href;
  children: ReactNode;
  /** Name for screen readers where the words alone don't say where it leads. */
  accessibleLabel?: string;
}

/** A place to go to, within text or on its own; 48 px high. */
export const Link = ({ href, children, accessibleLabel }: LinkProps) => (
  <RouterLink href={href} style={styles.link} {...(accessibleLabel ? { 'aria-label': accessibleLabel } : {})}>
    {children}
  </RouterLink>
);

interface LinkButtonProps {
  href: Href;
  label: string;
  /** primary is hi-vis: the one next action of the page. */
  kind?: 'primary' | 'plain';
  size?: 48 | 64;
  fill?: boolean;
  accessibleLabel?: string;
}

/** A place to go to, drawn as a button, where going there is the next thing to do. */
export const LinkButton = ({ href, label, kind = 'plain', size = 48, fill, accessibleLabel }: LinkButtonProps) => (
  <RouterLink
    href={href}
    {...(accessibleLabel ? { 'aria-label': accessibleLabel } : {})}
    style={[
      styles.button,
      size === 64 ? styles.large : styles.normal,
      kind === 'primary' ? styles.primary : styles.plain,
      fill ? styles.fill : styles.fit,
    ]}
  >
    {label}
  </RouterLink>
);

const styles = StyleSheet.create({
  link: {
    ...type.body,
    color: color.ink,
    textDecorationLine: 'underline',
    minHeight: target.normal,
    lineHeight: target.normal,
    alignSelf: 'flex-start',
  },
  button: { borderWidth: 2, borderRadius: 4, paddingHorizontal: 20, textAlign: 'center', textDecorationLine: 'none' },
  normal: { ...type.body, fontFamily: font.bodyBold, fontWeight: '700', paddingVertical: 10, minHeight: 48 },
  large: { ...type.heading, paddingVertical: 15, minHeight: 64 },
  primary: { backgroundColor: color.vis, borderColor: color.onVis, color: color.onVis },
  plain: { backgroundColor: color.raised, borderColor: color.ink, color: color.ink },
  fit: { alignSelf: 'flex-start', marginVertical: space.xs },
  fill: { alignSelf: 'stretch' },
});
