import { Redirect, Slot, usePathname } from 'expo-router';
import { useEffect, useRef, useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { hasAbility, useMe } from '@/hooks/useMe';
import { ApiFailure } from '@/lib/api';
import { useOnline } from '@/lib/online';
import { t } from '@/shared/messages';
import { useWide } from '../theme/layout';
import { color, space } from '../theme/tokens';
import { Screen } from '../ui/Screen';
import { ErrorState } from '../ui/states';
import { Text } from '../ui/Text';
import { BottomBar, SideRail } from './Navigation';

/** After going to another place, the keyboard and the screen reader start at the page, not where they were before. */
function useFocusOnArrival(pathname: string) {
  const first = useRef(true);
  useEffect(() => {
    if (first.current) {
      first.current = false;
      return;
    }
    const main = document.getElementById('main');
    if (main && !main.contains(document.activeElement)) main.focus({ preventScroll: true });
  }, [pathname]);
}

/** Leads to sign-in, and from there back to this place. The address changes while it leads there: only the first one counts. */
function ToSignIn() {
  const pathname = usePathname();
  const [from] = useState(pathname);
  return <Redirect href={{ pathname: '/sign-in', params: from === '/' ? {} : { back: from } }} />;
}

/** The frame of every place for people who are signed in: navigation, the place, and what has to be known everywhere. */
export function Frame() {
  const me = useMe();
  const wide = useWide();
  const online = useOnline();
  const pathname = usePathname();
  useFocusOnArrival(pathname);
  if (me.error instanceof ApiFailure && me.error.id === 'unauthenticated') {
    return <ToSignIn />;
  }
  if (pathname === '/' && me.data && !hasAbility(me.data, 'work.read') && hasAbility(me.data, 'calendar.read')) {
    return <Redirect href="/calendar" />;
  }
  // until it is known who is here, the shell of the page stays
  if (!me.data && !me.error) return null;
  return (
    <View style={[styles.frame, wide && styles.wide]}>
      <a className="to-main" href="#main">
        {t('nav.toMain')}
      </a>
      {wide ? <SideRail /> : null}
      <View role="main" id="main" tabIndex={-1} style={styles.main}>
        {me.data ? (
          <Slot />
        ) : (
          <Screen title="Yardbell">
            <ErrorState error={me.error} onRetry={() => void me.refetch()} />
          </Screen>
        )}
        {online ? null : (
          <View role="status" style={styles.offline}>
            <Text variant="small">{t('nav.offline')}</Text>
          </View>
        )}
      </View>
      {wide || !me.data ? null : <BottomBar />}
    </View>
  );
}

const styles = StyleSheet.create({
  frame: { flex: 1, backgroundColor: color.page, minHeight: 0 },
  wide: { flexDirection: 'row' },
  main: { flex: 1, minWidth: 0, minHeight: 0, outlineWidth: 0 },
  offline: {
    paddingHorizontal: space.m,
    paddingVertical: space.s,
    borderTopWidth: 1,
    borderTopColor: color.rail,
    backgroundColor: color.sunk,
  },
});
