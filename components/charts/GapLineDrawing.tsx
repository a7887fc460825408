import { color } from '../theme/tokens';
import type { GapLineLayout } from './gapLineLayout';

/** The lines of the picture; the words stand over it as text. */
export function GapLineDrawing({ layout, chosen }: { layout: GapLineLayout; chosen: string | null }) {
  const { above, width } = layout;
  return (
    <svg width={width} height={above + layout.below} aria-hidden style={{ position: 'absolute', left: 0, top: 0 }}>
      <line x1={20} x2={width - 8} y1={above} y2={above} stroke={color.ink} strokeWidth={3} />
      {layout.days.map((day) => (
        <line key={day.day} x1={day.x} x2={day.x} y1={above - 5} y2={above + 6} stroke={color.ink} strokeWidth={1.5} />
      ))}
      {layout.visits.map((visit) => (
        <g key={visit.id}>
          <line x1={visit.x} x2={visit.x} y1={above - visit.lift} y2={above} stroke={color.ink} strokeWidth={2} />
          <rect
            x={visit.windowX}
            y={above - 6}
            width={visit.windowWidth}
            height={12}
            fill={visit.id === chosen ? color.vis : color.ink}
            stroke={color.ink}
            strokeWidth={2}
          />
        </g>
      ))}
      {layout.gaps.map((gap) => {
        const y = above + 52 + gap.row * 34;
        return (
          <path
            key={gap.id}
            d={`M${gap.x1} ${y - 12} V${y} H${gap.x2} V${y - 12}`}
            fill="none"
            stroke={color.ink}
            strokeWidth={1.5}
          />
        );
      })}
    </svg>
  );
}
