/** Digits on a 3 × 5 grid, rows from the top, so that no font is needed and a test can read them. */
const ROWS = [
  '75557', '26227', '71747', '71717', '55711', '74717', '74757', '71122', '75757', '75717',
] as const; // prettier-ignore

/** Writes a frame's number white on black in the upper left corner of an RGBA picture. */
export function drawNumber(picture: Uint8ClampedArray, width: number, value: number): void {
  const cell = Math.max(2, Math.round(width / 180));
  const text = String(value).padStart(4, '0');
  const dot = (x: number, y: number, level: number): void => {
    picture.set([level, level, level, 255], (y * width + x) * 4);
  };
  for (let y = 0; y < cell * 7; y++) for (let x = 0; x < cell * (text.length * 4 + 1); x++) dot(x, y, 0);
  [...text].forEach((digit, i) => {
    const rows = ROWS[Number(digit)] ?? ROWS[0];
    [...rows].forEach((row, r) => {
      for (let c = 0; c < 3; c++) {
        if (!(Number(row) & (4 >> c))) continue;
        for (let y = 0; y < cell; y++)
          for (let x = 0; x < cell; x++) dot(cell * (1 + i * 4 + c) + x, cell * (1 + r) + y, 255);
      }
    });
  });
}
