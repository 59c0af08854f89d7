import type { ClipDto, View } from '@contract';
import { blockers } from './blockers';

const clip = (view: View, state: ClipDto['state']): ClipDto => ({
  id: view,
  takeId: 'take',
  view,
  state,
  progress: 0,
  sizeBytes: 1,
  sha256: '',
  durationMs: null,
  width: null,
  height: null,
  fps: null,
  frames: null,
  trim: null,
  problem: null,
  media: null,
});
const both: View[] = ['front', 'side'];

describe('what keeps a take from being handed in', () => {
  it('is nothing once every view has arrived, prepared or not', () => {
    expect(blockers({ clips: [clip('front', 'ready'), clip('side', 'uploaded')] }, both, [], false)).toEqual(
      [],
    );
  });

  it('is a view that is missing', () => {
    expect(blockers(null, both, [], false)).toEqual(['Film the front and the side first.']);
    expect(blockers({ clips: [] }, ['side'], [], false)).toEqual(['Film the side first.']);
  });

  it('is a view on its way, which is not called missing', () => {
    expect(blockers({ clips: [clip('front', 'ready')] }, both, ['side'], false)).toEqual([
      'Wait until the side has been sent.',
    ]);
  });

  it('is a clip that cannot be played', () => {
    expect(
      blockers({ clips: [clip('front', 'unplayable'), clip('side', 'ready')] }, both, [], false),
    ).toEqual(['Film the front again: it cannot be played.']);
  });

  it('is a guardian’s consent that is not recorded', () => {
    const clips = [clip('front', 'ready'), clip('side', 'ready')];
    expect(blockers({ clips }, both, [], true)).toHaveLength(1);
  });
});
