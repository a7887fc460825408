import type { ReactNode } from 'react';

/** Fields that are sent together: Enter in any of them sends. The button calls the same function. */
export function Form({ onSubmit, label, children }: { onSubmit: () => void; label?: string; children: ReactNode }) {
  return (
    <form
      noValidate
      {...(label ? { 'aria-label': label } : {})}
      style={{ display: 'flex', flexDirection: 'column', gap: 16, minWidth: 0 }}
      onSubmit={(event) => {
        event.preventDefault();
        onSubmit();
      }}
    >
      {children}
      {/* the browser sends on Enter only where there is a submit button */}
      <button type="submit" hidden tabIndex={-1} aria-hidden />
    </form>
  );
}
