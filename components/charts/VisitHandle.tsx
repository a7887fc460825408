import { useRef } from 'react';

import { t } from '@/shared/messages';
import { duration } from '@/shared/when';
import type { PlacedVisit } from './gapLineLayout';

interface HandleProps {
  visit: PlacedVisit;
  top: number;
  /** Least move in minutes; 0: this visit can't be moved. */
  step: number;
  /** Minutes per pixel of the line. */
  perPixel: number;
  onMove: (minutes: number) => void;
  onFocus: (visit: string | null) => void;
}

/** A grip on the line: arrow keys move the visit by one step, dragging by as many as the pointer goes. */
export function VisitHandle({ visit, top, step, perPixel, onMove, onFocus }: HandleProps) {
  const from = useRef<{ x: number; moved: number } | null>(null);
  if (step === 0) return null;
  const keys: Record<string, number> = { ArrowLeft: -step, ArrowDown: -step, ArrowRight: step, ArrowUp: step };
  return (
    <div
      role="slider"
      tabIndex={0}
      aria-label={t('protocols.moveVisit', { visit: visit.label })}
      aria-valuenow={Math.round(visit.minutes / 60)}
      aria-valuemin={0}
      aria-valuemax={Math.max(Math.round(visit.minutes / 60) + 240, 240)}
      aria-valuetext={duration(visit.minutes)}
      style={{
        position: 'absolute',
        left: visit.x - 24,
        top,
        width: 48,
        height: 48,
        cursor: 'ew-resize',
        touchAction: 'none',
      }}
      onFocus={() => onFocus(visit.id)}
      onBlur={() => onFocus(null)}
      onKeyDown={(event) => {
        const by = keys[event.key];
        if (by === undefined) return;
        event.preventDefault();
        onMove(by);
      }}
      onPointerDown={(event) => {
        event.currentTarget.setPointerCapture(event.pointerId);
        from.current = { x: event.clientX, moved: 0 };
      }}
      onPointerMove={(event) => {
        if (!from.current) return;
        const wanted = Math.round(((event.clientX - from.current.x) * perPixel) / step) * step;
        if (wanted === from.current.moved) return;
        onMove(wanted - from.current.moved);
        from.current.moved = wanted;
      }}
      onPointerUp={() => {
        from.current = null;
      }}
    />
  );
}
