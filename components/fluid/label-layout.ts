/** Where labels of a plot stand so that none prints over another. */

export interface PlacedText {
  /** point that it belongs to, per cent of the plot from the left and from the top */
  x: number;
  y: number;
  lines: readonly string[];
  /** the side of its point that it stands at where there is room */
  side: "left" | "right";
}

export interface Placement {
  side: "left" | "right";
  /** down from the point [px] */
  dy: number;
  block: Block;
}

export interface PlotBox {
  width: number;
  height: number;
}

/** Of 12 px type, on average and rather too wide than too narrow [px]. */
const CHARACTER = 6.4;
const LINE = 16;
/** from a point to its label [px] */
export const LABEL_GAP = 11;
const PASSES = 80;

/** Room that a text takes [px]. */
export interface Block {
  left: number;
  right: number;
  middle: number;
  height: number;
}

const widthOf = ({ lines }: PlacedText) =>
  Math.max(...lines.map((line) => line.length)) * CHARACTER;

function blockOf(text: PlacedText, side: Placement["side"], box: PlotBox): Block {
  const at = (text.x / 100) * box.width;
  const width = widthOf(text);
  const left = side === "right" ? at + LABEL_GAP : at - LABEL_GAP - width;
  return {
    left,
    right: left + width,
    middle: (text.y / 100) * box.height,
    height: text.lines.length * LINE,
  };
}

/** How far it reaches out of the plot [px]. */
const outside = ({ left, right }: Block, { width }: PlotBox) =>
  Math.max(0, -left) + Math.max(0, right - width);

const areBeside = (one: Block, other: Block) =>
  one.left < other.right + 4 && other.left < one.right + 4;

/** Sides first, so that labels stay in the plot; then those that overlap are pushed apart, up and down. */
export function layoutLabels(texts: readonly PlacedText[], box: PlotBox): Placement[] {
  const placed = texts.map((text) => {
    const other = text.side === "right" ? ("left" as const) : ("right" as const);
    const [wanted, opposite] = [blockOf(text, text.side, box), blockOf(text, other, box)];
    return outside(opposite, box) < outside(wanted, box)
      ? { side: other, block: opposite }
      : { side: text.side, block: wanted };
  });
  const starts = placed.map(({ block }) => block.middle);
  const order = placed.map(({ block }) => block).sort((a, b) => a.middle - b.middle);
  for (let pass = 0; pass < PASSES; pass += 1) {
    for (const [index, upper] of order.entries()) {
      for (const lower of order.slice(index + 1)) {
        const overlap = upper.middle + (upper.height + lower.height) / 2 - lower.middle;
        if (overlap <= 0 || !areBeside(upper, lower)) continue;
        upper.middle -= overlap / 2;
        lower.middle += overlap / 2;
      }
    }
    for (const block of order) {
      const half = block.height / 2;
      block.middle = Math.min(box.height - half, Math.max(half, block.middle));
    }
  }
  return placed.map(({ side, block }, index) => ({
    side,
    dy: Math.round(block.middle - starts[index]),
    block,
  }));
}

/** Room of a text centred at a point (per cent), where none of the blocks stands in its way. */
export function freeRoom(
  point: { x: number; y: number },
  text: string,
  blocks: readonly Block[],
  box: PlotBox,
): Block | null {
  const half = (text.length * CHARACTER) / 2;
  const [x, middle] = [(point.x / 100) * box.width, (point.y / 100) * box.height];
  const room = { left: x - half, right: x + half, middle, height: LINE };
  const isOut = outside(room, box) > 0 || middle < LINE / 2 || middle > box.height - LINE / 2;
  const isTaken = blocks.some(
    (block) =>
      areBeside(block, room) && Math.abs(middle - block.middle) < (block.height + LINE) / 2,
  );
  return isOut || isTaken ? null : room;
}
