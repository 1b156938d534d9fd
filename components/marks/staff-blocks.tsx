/**
 * The E-graduation of a levelling staff: blocks of a tenth, five in the upper half, five in the lower.
 * Ink runs to `end`; what lies beyond is drawn by the caller.
 */
export function StaffBlocks({
  x,
  y,
  tenth,
  half,
  end,
}: {
  x: number;
  y: number;
  tenth: number;
  half: number;
  end: number;
}) {
  const thin = half >= 12 ? 4 : 2;
  const blocks = [];
  for (let k = 0; x + k * tenth < end - 0.01; k++) {
    const upper = Math.floor(k / 5) % 2 === 0;
    const thick = (k % 5) % 2 === 0;
    const top = upper ? y : thick ? y + half : y + 2 * half - thin;
    blocks.push(
      <rect
        key={k}
        x={x + k * tenth}
        y={top}
        width={Math.min(tenth, end - x - k * tenth)}
        height={thick ? half : thin}
        className="g-on"
      />,
    );
  }
  return blocks;
}
