/** Colours of a close-up, taken from the tokens of the theme. */
export type SampleInk = { wave: string; after: string; axis: string; mark: string };

export type SampleDrawing = {
  before: readonly Float32Array[];
  after: readonly Float32Array[] | null;
  /** Which frames of the excerpt are marked. */
  markFrom: number;
  markTo: number;
};

/** Fewer samples than this a pixel are drawn one by one, as dots on a line. */
const dotsFromPixels = 5;

/** Draws the first channel of an excerpt down to single samples, the repaired one dashed over it. */
export function drawSamples(
  canvas: HTMLCanvasElement,
  drawing: SampleDrawing,
  ink: SampleInk,
): void {
  const ratio = devicePixelRatio;
  const width = (canvas.width = Math.round(canvas.clientWidth * ratio));
  const height = (canvas.height = Math.round(canvas.clientHeight * ratio));
  const context = canvas.getContext('2d');
  const [samples] = drawing.before;
  if (!context || !samples || samples.length === 0 || width === 0) return;
  const after = drawing.after?.[0];
  const reach = Math.max(peakOf(samples), after ? peakOf(after) : 0, 1e-5);
  const x = (frame: number): number => (frame / Math.max(1, samples.length - 1)) * width;
  const y = (sample: number): number => height / 2 - (sample / reach) * (height / 2) * 0.88;

  context.strokeStyle = ink.axis;
  context.lineWidth = ratio;
  line(context, [
    [0, height / 2],
    [width, height / 2],
  ]);
  context.fillStyle = ink.mark;
  context.globalAlpha = 0.14;
  const from = x(drawing.markFrom);
  context.fillRect(from, 0, Math.max(ratio * 2, x(drawing.markTo) - from), height);
  context.globalAlpha = 1;

  context.lineWidth = ratio * 1.5;
  context.strokeStyle = ink.wave;
  trace(context, samples, x, y, width);
  if (width / samples.length >= dotsFromPixels * ratio) {
    context.fillStyle = ink.wave;
    for (const [frame, sample] of samples.entries()) {
      context.beginPath();
      context.arc(x(frame), y(sample), ratio * 2, 0, 2 * Math.PI);
      context.fill();
    }
  }
  if (after) {
    context.strokeStyle = ink.after;
    context.setLineDash([4 * ratio, 3 * ratio]);
    trace(context, after, x, y, width);
    context.setLineDash([]);
  }
}

function peakOf(samples: Float32Array): number {
  let peak = 0;
  for (const sample of samples)
    if (Number.isFinite(sample)) peak = Math.max(peak, Math.abs(sample));
  return peak;
}

type Map1 = (value: number) => number;

/** One line through all samples, or lowest and highest of a pixel where there are many. */
function trace(
  context: CanvasRenderingContext2D,
  samples: Float32Array,
  x: Map1,
  y: Map1,
  width: number,
): void {
  const perPixel = samples.length / width;
  const points: [number, number][] = [];
  if (perPixel <= 2) samples.forEach((sample, frame) => points.push([x(frame), y(sample)]));
  else
    for (let column = 0; column < width; column++) {
      const part = samples.subarray(
        Math.floor(column * perPixel),
        Math.ceil((column + 1) * perPixel),
      );
      points.push([column, y(Math.max(...part))], [column, y(Math.min(...part))]);
    }
  line(context, points);
}

function line(
  context: CanvasRenderingContext2D,
  points: readonly (readonly [number, number])[],
): void {
  context.beginPath();
  for (const [x, y] of points) context.lineTo(x, y);
  context.stroke();
}
