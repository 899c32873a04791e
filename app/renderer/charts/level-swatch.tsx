import type { MarkerShape } from '../../study/level-style';
import { curveLook } from './palette';
import { useGround } from './use-ground';

/** A level's line and marker, as in the charts. */
export function LevelSwatch({ level }: { readonly level: string }) {
  const { colour, width, dash, shape } = curveLook(level, useGround());
  return (
    <svg className="swatch" viewBox="0 0 36 12" width="36" height="12" aria-hidden="true">
      <line
        x1="1"
        y1="6"
        x2="35"
        y2="6"
        stroke={colour}
        strokeWidth={width}
        strokeDasharray={dash.join(' ')}
      />
      <path d={MARKER_PATHS[shape]} transform="translate(18 6)" fill={colour} />
    </svg>
  );
}

/** About the origin, some 7 units wide. */
const MARKER_PATHS: Readonly<Record<MarkerShape, string>> = {
  circle: 'M-3.5 0a3.5 3.5 0 1 0 7 0a3.5 3.5 0 1 0 -7 0z',
  square: 'M-3.2-3.2h6.4v6.4h-6.4z',
  diamond: 'M0-4.6L4.6 0L0 4.6L-4.6 0z',
  'triangle-up': 'M0-4.2L4 3H-4z',
  'triangle-down': 'M0 4.2L4-3H-4z',
};
