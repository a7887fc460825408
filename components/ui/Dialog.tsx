import { useEffect, useId, useRef, type KeyboardEvent, type ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';

import { t } from '@/shared/messages';
import { space } from '../theme/tokens';
import { Button } from './Button';
import { Text } from './Text';

interface DialogProps {
  open: boolean;
  onClose: () => void;
  title: string;
  children?: ReactNode;
  /** Buttons, the safe one last on a phone's thumb. */
  actions?: ReactNode;
}

const reachable =
  'a[href], button:not([disabled]):not([hidden]), input:not([disabled]), select:not([disabled]), textarea:not([disabled]), [tabindex="0"]';

/** Keeps the Tab key inside; the browser's own dialog makes everything behind it inert. */
function keepInside(event: KeyboardEvent<HTMLDialogElement>) {
  if (event.key !== 'Tab') return;
  const stops = [...event.currentTarget.querySelectorAll<HTMLElement>(reachable)];
  const first = stops[0];
  const last = stops[stops.length - 1];
  if (!first || !last) return;
  const leaving = event.shiftKey ? document.activeElement === first : document.activeElement === last;
  if (!leaving && event.currentTarget.contains(document.activeElement)) return;
  event.preventDefault();
  (event.shiftKey ? last : first).focus();
}

function OpenDialog({ onClose, title, children, actions }: Omit<DialogProps, 'open'>) {
  const ref = useRef<HTMLDialogElement>(null);
  const heading = useId();
  useEffect(() => {
    const before = document.activeElement;
    const dialog = ref.current;
    dialog?.showModal();
    return () => {
      dialog?.close();
      if (before instanceof HTMLElement) before.focus();
    };
  }, []);
  return (
    <dialog
      ref={ref}
      className="dialog"
      aria-labelledby={heading}
      onKeyDown={(event) => {
        if (event.key === 'Escape') {
          event.preventDefault();
          event.stopPropagation();
          onClose();
        }
        keepInside(event);
      }}
      // a phone's own back gesture closes a dialog too
      onCancel={(event) => {
        event.preventDefault();
        onClose();
      }}
    >
      <View style={styles.inside}>
        <Text variant="heading" level={2} nativeID={heading}>
          {title}
        </Text>
        {children}
        {actions ? <View style={styles.actions}>{actions}</View> : null}
      </View>
    </dialog>
  );
}

/** A question or a short form over the page. Escape closes it, and focus goes back where it was. */
export const Dialog = ({ open, ...rest }: DialogProps) => (open ? <OpenDialog {...rest} /> : null);

interface ConfirmProps {
  open: boolean;
  title: string;
  /** What will happen, with figures, and whether it can be undone. */
  body: string;
  confirmLabel: string;
  onConfirm: () => void;
  onClose: () => void;
  danger?: boolean;
  busy?: boolean;
  /** Why it failed; the dialog stays open. */
  error?: string | undefined;
}

/** Asks once before what can't be undone. */
export const Confirm = ({
  open,
  title,
  body,
  confirmLabel,
  onConfirm,
  onClose,
  danger,
  busy = false,
  error,
}: ConfirmProps) => (
  <Dialog
    open={open}
    onClose={onClose}
    title={title}
    actions={
      <>
        <Button label={confirmLabel} kind={danger ? 'danger' : 'plain'} onPress={onConfirm} busy={busy} />
        <Button label={t('ui.cancel')} kind="quiet" onPress={onClose} />
      </>
    }
  >
    <Text>{body}</Text>
    {error ? (
      <Text tone="stop" strong role="alert">
        {error}
      </Text>
    ) : null}
  </Dialog>
);

const styles = StyleSheet.create({
  inside: { padding: space.l, gap: space.m },
  actions: { flexDirection: 'row', flexWrap: 'wrap', gap: space.s, marginTop: space.s },
});
