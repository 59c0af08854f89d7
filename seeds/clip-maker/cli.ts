import { writeFile } from 'node:fs/promises';
import { parseArgs } from 'node:util';
import { type ClipOptions, LIFT_IDS, type LiftId, VIEWS, type View, makeClip } from './index';

const HELP = `Draws a clip of a lift.
  --lift ${LIFT_IDS.join('|')}
  --view front|side    --out FILE.mp4    --truth FILE.json
  --reps N  --tempo DOWN,PAUSE,UP,PAUSE (seconds)  --depth 0.3-1.1  --fps N  --size SHORTxLONG
  --landscape  --off-axis DEGREES  --seed N  --sway 0-1  --load KG
  --fault ID:DOSE (again for more)  --counter  --dots  --hevc`;

const { values } = parseArgs({
  options: {
    lift: { type: 'string' },
    view: { type: 'string' },
    out: { type: 'string' },
    truth: { type: 'string' },
    reps: { type: 'string' },
    tempo: { type: 'string' },
    depth: { type: 'string' },
    fps: { type: 'string' },
    size: { type: 'string' },
    landscape: { type: 'boolean' },
    'off-axis': { type: 'string' },
    seed: { type: 'string' },
    sway: { type: 'string' },
    load: { type: 'string' },
    fault: { type: 'string', multiple: true },
    counter: { type: 'boolean' },
    dots: { type: 'boolean' },
    hevc: { type: 'boolean' },
  },
});

const number = (text: string | undefined): number | undefined =>
  text === undefined ? undefined : Number(text);

function optionsFrom(lift: LiftId, view: View): ClipOptions {
  const [downS, pauseBottomS, upS, pauseTopS] = values.tempo?.split(',').map(Number) ?? [];
  const [shortPx, longPx] = values.size?.split('x').map(Number) ?? [];
  const faults = (values.fault ?? []).map((text) => {
    const [id = '', dose = '1'] = text.split(':');
    return [id, Number(dose)] as const;
  });
  return {
    lift,
    view,
    seed: number(values.seed),
    reps: number(values.reps),
    tempo: values.tempo ? { downS, pauseBottomS, upS, pauseTopS } : undefined,
    depth: number(values.depth),
    fps: number(values.fps),
    size: shortPx && longPx ? { shortPx, longPx } : undefined,
    orientation: values.landscape ? 'landscape' : 'portrait',
    offAxisDeg: number(values['off-axis']),
    sway: number(values.sway),
    loadKg: number(values.load),
    faults: Object.fromEntries(faults),
    frameCounter: values.counter,
    jointDots: values.dots,
    file: values.hevc ? { codec: 'hevc' } : undefined,
  };
}

const lift = LIFT_IDS.find((id) => id === values.lift);
const view = VIEWS.find((name) => name === values.view);
if (!lift || !view || !values.out) {
  console.error(HELP);
  process.exitCode = 2;
} else {
  const truth = await makeClip(optionsFrom(lift, view), values.out);
  if (values.truth) await writeFile(values.truth, `${JSON.stringify(truth)}\n`);
  console.log(
    `${values.out}: ${truth.frameCount} frames, ${truth.reps} reps of ${truth.lift}, ${truth.view}`,
  );
}
