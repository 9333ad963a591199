// The mathematics of drawing: a straight axis and its round marks.

/** Maps a range of values onto a range of pixels. */
export type Axis = ((value: number) => number) & { domain: [number, number]; marks: number[] };

/** An axis from lo to hi, drawn from one pixel to another, with about so many marks. */
export function axis(lo: number, hi: number, from: number, to: number, marks = 5): Axis {
  const width = hi > lo ? hi - lo : 1;
  const map = (value: number): number => from + ((value - lo) / width) * (to - from);
  return Object.assign(map, { domain: [lo, hi] as [number, number], marks: roundMarks(lo, lo + width, marks) });
}

/** Round values between lo and hi: steps of 1, 2 or 5 times a power of ten. */
function roundMarks(lo: number, hi: number, count: number): number[] {
  const rough = (hi - lo) / count;
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = [1, 2, 5, 10].map((n) => n * power).find((s) => s >= rough) ?? rough;
  const marks: number[] = [];
  for (let n = Math.ceil(lo / step); n * step <= hi + step * 1e-9; n++) marks.push(Number((n * step).toPrecision(12)));
  return marks;
}

/** The path through points. */
export function path(points: [number, number][]): string {
  return points.map(([x, y], i) => `${i === 0 ? "M" : "L"}${x.toFixed(1)} ${y.toFixed(1)}`).join("");
}
