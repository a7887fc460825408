import { useEffect, type ReactNode } from 'react';
import { ScrollView, StyleSheet, View } from 'react-native';

import { useWide } from '../theme/layout';
import { color, space } from '../theme/tokens';
import { Link } from './Link';
import { Padded } from './Rail';
import { Text } from './Text';
import type { Href } from 'expo-router';

interface ScreenProps {
  /** The page's one h1, and what the browser's tab says. */
  title: string;
  /** Quiet line above the title. */
  kicker?: ReactNode;
  /** Quiet line below the title. */
  subtitle?: ReactNode;
  back?: { href: Href; label: string };
  /** Buttons at the right of the title. */
  toolbar?: ReactNode;
  /** full: tables and drawings; reading (default): 880 px. */
  width?: 'reading' | 'full';
  /** False where the page scrolls by itself, as a SplitPane does. */
  scroll?: boolean;
  /** False: content goes edge to edge on a phone, as rails do. */
  padded?: boolean;
  /** Stays at the bottom, at the thumb. */
  footer?: ReactNode;
  children?: ReactNode;
}

/** A place: title, toolbar, content. Takes away the shell that stood here while the program was loading. */
export function Screen(props: ScreenProps) {
  const {
    title,
    kicker,
    subtitle,
    back,
    toolbar,
    width = 'reading',
    scroll = true,
    padded = true,
    footer,
    children,
  } = props;
  const wide = useWide();
  useEffect(() => {
    document.title = `${title} · Yardbell`;
    document.getElementById('shell')?.remove();
  }, [title]);
  const side = wide ? space.xl : space.m;
  const limit = width === 'reading' && styles.reading;
  const quiet = (line: ReactNode) =>
    typeof line === 'string' ? (
      <Text variant="small" tone="quiet">
        {line}
      </Text>
    ) : (
      line
    );
  const head = (
    <View style={[styles.head, { paddingHorizontal: side }]}>
      <View style={styles.words}>
        {back ? <Link href={back.href}>{`‹ ${back.label}`}</Link> : null}
        {quiet(kicker)}
        <Text variant="title">{title}</Text>
        {quiet(subtitle)}
      </View>
      {toolbar ? <View style={styles.toolbar}>{toolbar}</View> : null}
    </View>
  );
  const body = [padded && { paddingHorizontal: side }, styles.body, limit];
  return (
    <View style={styles.screen}>
      {scroll ? (
        <ScrollView style={styles.screen} contentContainerStyle={styles.end}>
          {head}
          <View style={body}>
            <Padded value={padded}>{children}</Padded>
          </View>
        </ScrollView>
      ) : (
        <>
          {head}
          <View style={styles.rest}>{children}</View>
        </>
      )}
      {footer ? <View style={[styles.footer, { paddingHorizontal: side }]}>{footer}</View> : null}
    </View>
  );
}

const styles = StyleSheet.create({
  screen: { flex: 1, minHeight: 0, backgroundColor: color.page },
  head: {
    flexDirection: 'row',
    flexWrap: 'wrap',
    alignItems: 'flex-end',
    justifyContent: 'space-between',
    gap: space.m,
    paddingTop: space.m,
    paddingBottom: space.m,
    borderBottomWidth: 3,
    borderBottomColor: color.ink,
  },
  words: { flexShrink: 1, minWidth: 0, gap: 2 },
  toolbar: { flexDirection: 'row', flexWrap: 'wrap', gap: space.s, flexShrink: 1, maxWidth: '100%' },
  body: { paddingTop: space.m, gap: space.m },
  reading: { maxWidth: 880 },
  rest: { flex: 1, minHeight: 0 },
  end: { paddingBottom: space.xxl },
  footer: { paddingVertical: space.s, borderTopWidth: 1, borderTopColor: color.rail, backgroundColor: color.page },
});
