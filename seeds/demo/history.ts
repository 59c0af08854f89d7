import type { AssignmentDto, LiftDto } from '../../server/contract';
import type { Calendar } from './calendar';
import type { Desk, DeskPerson } from './desk';
import { answer, film, filmBroken, pairOf, type Answered } from './story';

export type People = Readonly<
  Record<'maren' | 'petru' | 'tove' | 'ilmari' | 'signe' | 'joaquin' | 'edda', DeskPerson>
>;

/** The pairs that the history shows; each person is drawn by one seed. */
export const PAIRS = {
  toveFirst: pairOf('goblet-squat', 60, { 'heels-lift': 0.8, 'chest-drops': 0.4 }),
  toveSecond: pairOf('goblet-squat', 60, { 'chest-drops': 0.2 }, ['side']),
  ilmariFirst: pairOf('swing', 49, { 'squats-instead-of-hinging': 0.8, 'arms-lift-early': 0.5 }),
  ilmariSecond: pairOf('swing', 49, { 'arms-lift-early': 0.2 }),
  eddaPress: pairOf('push-press', 28, { 'ribs-flare': 0.8, 'uneven-press': 0.4 }),
  eddaSquat: pairOf('goblet-squat', 28, { 'knees-fall-in': 0.7 }),
  signeHold: pairOf('split-squat-hold', 38, { 'knees-fall-in': 0.5, 'leans-forward': 0.5 }),
  joaquinSwing: pairOf('swing', 52, { 'bell-too-low': 0.7 }),
} as const;

const HEELS: Answered = {
  said: [
    {
      view: 'side',
      at: 'bottom',
      body: 'Here the heels let go of the floor and you tip onto the toes.',
      fault: 'Heels leave the floor',
    },
    {
      view: 'side',
      at: 'bottom',
      rep: 2,
      body: 'And here again. Slow the last third down and the soles stay where they are.',
    },
    { view: 'front', at: 'bottom', body: 'Knees track well. Keep exactly this.' },
  ],
  seen: ['Heels leave the floor', 'Chest drops'],
  topCue: 'Leave two full footprints all the way down',
  call: 'light',
  refilm: { views: ['side'], note: 'Two reps with the toes a hand from a wall, side only.' },
};

const HINGE: Answered = {
  said: [
    {
      view: 'side',
      at: 'bottom',
      body: 'This is a squat: knees go forward, the bell goes down. Let it go back instead.',
      fault: 'Squats instead of hinging',
    },
    {
      view: 'side',
      at: 'fault',
      body: 'The elbows bend before you are tall: the arms finish what the hips began.',
      fault: 'Arms lift before the hips finish',
    },
  ],
  seen: ['Squats instead of hinging', 'Arms lift before the hips finish'],
  topCue: 'Throw the bell at the wall behind you, high between the legs',
  call: 'scale',
  scale: 'Hinge to a wall',
  refilm: { views: ['front', 'side'], note: 'Three swings when the deck is quiet.' },
};

const HINGE_CLEARED: Answered = {
  said: [
    { view: 'side', at: 'bottom', body: 'That is the hinge. Look how quiet the knees are now.' },
    {
      view: 'side',
      at: 'fault',
      rep: 2,
      body: 'Half of what it was, but the arms still start early. Stand up first, then let it fly.',
      fault: 'Arms lift before the hips finish',
    },
  ],
  seen: ['Arms lift before the hips finish'],
  topCue: 'Let the bell float; the floor throws it, not the shoulders',
  call: 'go',
};

const RIBS: Answered = {
  said: [
    {
      view: 'side',
      at: 'fault',
      body: 'The ribs open here and the low back takes the bar.',
      fault: 'Ribs flare overhead',
    },
    {
      view: 'front',
      at: 'fault',
      body: 'The left hand runs a palm ahead of the right here.',
      fault: 'One side presses first',
    },
  ],
  seen: ['Ribs flare overhead', 'One side presses first'],
  topCue: 'Zip the jacket up before the bar passes your face',
  call: 'light',
};

interface Step {
  readonly at: Date;
  readonly act: () => Promise<void>;
}

/**
 * Lives through the last days of the gym, step by step in the order of time.
 * @param say told after each step, with how many are done
 */
export async function liveHistory(
  desk: Desk,
  people: People,
  lifts: ReadonlyMap<string, LiftDto>,
  calendar: Calendar,
  files: { readonly dir: string; readonly broken: string },
  said: (done: number, of: number) => void,
): Promise<void> {
  const { maren, petru, tove, ilmari, signe, joaquin, edda } = people;
  const lift = (name: string): LiftDto => {
    const found = lifts.get(name);
    if (!found) throw new Error(`the library has no ${name}`);
    return found;
  };
  const scaleOf = (name: string, scale: string) => lift(name).scales.find((one) => one.name === scale)?.id;
  const assigned = new Map<string, AssignmentDto>();
  const assignment = (key: string): AssignmentDto => {
    const found = assigned.get(key);
    if (!found) throw new Error(`nothing was assigned as ${key} yet`);
    return found;
  };
  const assign = (key: string, coach: DeskPerson, body: unknown) => async () => {
    assigned.set(key, await desk.call<AssignmentDto>(coach, 'POST', '/api/assignments', body));
  };
  const takes = new Map<keyof typeof PAIRS, string>();
  const films =
    (pair: keyof typeof PAIRS, who: DeskPerson, key: string, words: Parameters<typeof film>[5] = {}) =>
    async () => {
      takes.set(pair, await film(desk, files.dir, who, assignment(key), PAIRS[pair], words));
    };
  const answers = (pair: keyof typeof PAIRS, coach: DeskPerson, words: Answered) => async () => {
    await answer(desk, coach, takes.get(pair) ?? '', PAIRS[pair], words);
  };
  const reads = (pair: keyof typeof PAIRS, who: DeskPerson) => async () => {
    await desk.call(who, 'POST', `/api/takes/${takes.get(pair) ?? ''}/read`);
  };

  const toveFilms = calendar.daysAgo(6, '18:10');
  const ilmariFilms = calendar.daysAgo(5, '03:12');
  const ilmariAgain = calendar.daysAgo(3, '02:50');
  const eddaPresses = calendar.daysAgo(4, '17:20');
  const after = calendar.coachingHoursAfter;
  const soon = new Date(calendar.hoursAgo(-20).getTime());

  const steps: Step[] = [
    {
      at: calendar.daysAgo(9, '09:00'),
      act: assign('squat', maren, {
        liftId: lift('Goblet squat').id,
        title: 'Squats before the hard week',
        note: 'Show me two quiet ones before you do all of them.',
        load: '16 kg',
        reps: 8,
        rounds: 4,
        untilAnsweredScaleId: scaleOf('Goblet squat', 'Squat to a chair'),
        audience: { all: true },
      }),
    },
    {
      at: calendar.daysAgo(8, '10:00'),
      act: assign('swing', petru, {
        liftId: lift('Two-handed swing').id,
        title: 'Swings for Saturday',
        note: 'Leave room in front of the phone.',
        load: '24 kg',
        reps: 10,
        rounds: 6,
        untilAnsweredScaleId: scaleOf('Two-handed swing', 'Dead-stop swing'),
        audience: { all: true },
      }),
    },
    {
      at: calendar.daysAgo(7, '11:30'),
      act: assign('press', petru, {
        liftId: lift('Push press').id,
        title: 'Push press, first heavy triples',
        load: '40 kg',
        reps: 3,
        rounds: 5,
        untilAnsweredScaleId: scaleOf('Push press', 'Half-kneeling press'),
        audience: { memberIds: [edda.userId, joaquin.userId] },
      }),
    },
    {
      at: calendar.daysAgo(7, '12:00'),
      act: assign('hold', maren, {
        liftId: lift('Split-squat hold').id,
        title: 'Holds for a calm knee',
        note: 'As your physiotherapist and I agreed: no pain, no hurry.',
        load: 'no load',
        reps: 2,
        rounds: 3,
        untilAnsweredScaleId: scaleOf('Split-squat hold', 'Half-kneeling hold'),
        audience: { memberIds: [signe.userId] },
      }),
    },
    {
      at: toveFilms,
      act: films('toveFirst', tove, 'squat', {
        load: '16 kg',
        implement: 'one bell',
        note: 'Feels fine until the bottom.',
      }),
    },
    { at: after(toveFilms, 2.5), act: answers('toveFirst', maren, HEELS) },
    { at: after(toveFilms, 3.5), act: reads('toveFirst', tove) },
    {
      at: ilmariFilms,
      act: films('ilmariFirst', ilmari, 'swing', {
        load: '24 kg',
        note: 'Filmed at anchor, the floor moves a bit.',
      }),
    },
    { at: after(ilmariFilms, 1.6), act: answers('ilmariFirst', petru, HINGE) },
    { at: after(ilmariFilms, 2), act: reads('ilmariFirst', ilmari) },
    { at: eddaPresses, act: films('eddaPress', edda, 'press', { load: '40 kg', implement: 'barbell' }) },
    { at: after(eddaPresses, 4), act: answers('eddaPress', petru, RIBS) },
    { at: ilmariAgain, act: films('ilmariSecond', ilmari, 'swing', { load: '16 kg' }) },
    { at: after(ilmariAgain, 2.2), act: answers('ilmariSecond', petru, HINGE_CLEARED) },
    {
      at: calendar.justOverdue(),
      act: films('eddaSquat', edda, 'squat', { load: '24 kg', implement: 'one bell' }),
    },
    {
      at: calendar.hoursAgo(2.4),
      act: films('toveSecond', tove, 'squat', { load: '16 kg', note: 'Toes at the wall, as you said.' }),
    },
    {
      at: calendar.hoursAgo(1.2),
      act: films('signeHold', signe, 'hold', {
        load: 'no load',
        note: 'The left side only; the right was fine.',
        pain: { where: 'left knee, below the cap', level: 3 },
      }),
    },
    {
      at: calendar.hoursAgo(0.6),
      act: () => filmBroken(desk, files.dir, joaquin, assignment('press'), PAIRS.eddaPress, files.broken),
    },
    {
      at: calendar.hoursAgo(0.3),
      act: films('joaquinSwing', joaquin, 'swing', {
        neededBy: soon.toISOString(),
        load: '22 kg',
        implement: 'dumbbell held upright',
      }),
    },
  ];
  const inOrder = steps.toSorted((a, b) => a.at.getTime() - b.at.getTime());
  for (const [index, step] of inOrder.entries()) {
    desk.setClock(step.at);
    await step.act();
    said(index + 1, inOrder.length);
  }
}
