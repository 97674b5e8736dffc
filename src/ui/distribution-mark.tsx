import { DefaultZIndexes, usePlotArea, useXAxisScale, ZIndexLayer } from 'recharts';

type DistributionMarkProps = {
  /** The bar that it marks: the observed one and the one as far through their middle, the limit's at its start. */
  bar: number;
  kind: 'observed' | 'limit' | 'mirrored';
  text: string;
  /** The side on which the words stand if there is room for them. */
  side: 'left' | 'right';
};

const rowHeightPx = 24;
const looks = {
  observed: {
    position: 'middle',
    row: 0,
    line: 'stroke-copper [stroke-width:2.5]',
    words: 'fill-copper font-bold',
  },
  limit: { position: 'start', row: 1, line: 'stroke-ink [stroke-dasharray:4_4] [stroke-width:1.5]', words: 'fill-ink' },
  mirrored: {
    position: 'middle',
    row: 1,
    line: 'stroke-ink [stroke-dasharray:4_4] [stroke-width:1.5]',
    words: 'fill-ink',
  },
} as const;

/** A line down to the axis with its name beside its upper end; each kind has a row of its own. */
export function DistributionMark({ bar, kind, text, side }: DistributionMarkProps) {
  const plot = usePlotArea();
  const scale = useXAxisScale();
  const look = looks[kind];
  const x = scale?.(bar, { position: look.position });
  if (!plot || x === undefined) return null;
  const top = plot.y + look.row * rowHeightPx;
  const isRight = hasRoom(side, x, plot, text) ? side === 'right' : side !== 'right';
  return (
    <ZIndexLayer zIndex={DefaultZIndexes.line}>
      <line x1={x} x2={x} y1={top} y2={plot.y + plot.height} className={look.line} />
      <text
        x={isRight ? x + 8 : x - 8}
        y={top + 16}
        textAnchor={isRight ? 'start' : 'end'}
        className={`stroke-page font-sans [paint-order:stroke] [stroke-width:5] ${look.words}`}
      >
        {text}
      </text>
    </ZIndexLayer>
  );
}

/** Letters of the text face are on average somewhat more than half as wide as they are high (16 px). */
function hasRoom(side: 'left' | 'right', x: number, plot: { x: number; width: number }, text: string): boolean {
  const neededPx = text.length * 9.5 + 8;
  return side === 'right' ? x + neededPx <= plot.x + plot.width : x - neededPx >= plot.x;
}
