/** Stand-in for expo-router in component tests: the real one can't be loaded here (CommonJS that needs native files). */
import { cloneElement, isValidElement, type ReactElement, type ReactNode } from 'react';
import { StyleSheet } from 'react-native';

type Value = string | number | undefined;
export type Href = string | { pathname: string; params?: Record<string, Value> };

export const calls: { method: string; href: string }[] = [];
let params: Record<string, string> = {};
let pathname = '/';

export const setParams = (next: Record<string, string>): void => {
  params = next;
};
export const setPathname = (next: string): void => {
  pathname = next;
};
export const resetRouter = (): void => {
  calls.length = 0;
  params = {};
  pathname = '/';
};

/** The address that a href comes to. */
export function text(href: Href): string {
  if (typeof href === 'string') return href;
  const left = { ...href.params };
  const path = href.pathname.replace(/\[(\w+)\]/g, (_, key: string) => {
    const value = left[key];
    delete left[key];
    return encodeURIComponent(String(value ?? ''));
  });
  const query = Object.entries(left).filter((pair): pair is [string, string | number] => pair[1] !== undefined);
  return query.length > 0 ? `${path}?${new URLSearchParams(query.map(([k, v]) => [k, String(v)]))}` : path;
}

interface LinkProps {
  children: ReactNode;
  href: Href;
  asChild?: boolean;
  style?: object;
  'aria-label'?: string;
}

export function Link({ children, href, asChild, style, ...rest }: LinkProps) {
  const to = text(href);
  if (asChild && isValidElement(children))
    return cloneElement(children as ReactElement<{ href?: string }>, { href: to });
  return (
    <a href={to} style={StyleSheet.flatten(style)} {...rest}>
      {children}
    </a>
  );
}

const note = (method: string) => (href: Href) => {
  calls.push({ method, href: text(href) });
};
export const router = {
  push: note('push'),
  replace: note('replace'),
  navigate: note('navigate'),
  back: () => calls.push({ method: 'back', href: '' }),
  canGoBack: () => false,
  setParams: (next: Record<string, string>) => {
    params = { ...params, ...next };
  },
};
export const useRouter = () => router;
export const useLocalSearchParams = () => params;
export const useGlobalSearchParams = () => params;
export const usePathname = () => pathname;
export const useFocusEffect = () => undefined;

export function Redirect({ href }: { href: Href }) {
  return <p>redirected to {text(href)}</p>;
}
export const Slot = () => <p>the place itself</p>;
