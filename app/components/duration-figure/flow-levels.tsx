import { LevelLines } from '../level-lines/level-lines';
import type { FigureLevel } from './duration-figure';
import type { FigurePlan } from './lay-out';

interface Props {
  levels: readonly FigureLevel[];
  plan: FigurePlan;
  width: number;
  height: number;
}

const OVERLAY = { position: 'absolute', inset: 0, pointerEvents: 'none' } as const;

/** Named flows across the figure, those in the range of its flow axis. */
export function FlowLevels({ levels, plan: { flow, plot, toPixel }, width, height }: Props) {
  const shown = levels.flatMap(({ label, flow: value }) => {
    const at = flow.position(value);
    const inRange = at !== null && at >= flow.domain[0] && at <= flow.domain[1];
    return inRange ? [{ label, y: toPixel(at) }] : [];
  });
  if (shown.length === 0) return null;
  return (
    <svg style={OVERLAY} width={width} height={height} aria-hidden="true">
      <LevelLines levels={shown} left={plot.left} right={plot.right} top={plot.top + 6} bottom={plot.bottom - 6} />
    </svg>
  );
}
