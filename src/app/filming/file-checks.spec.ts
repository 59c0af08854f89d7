import { checkFile, checkVideo, CLIP_MAX_BYTES, lengthWords } from './file-checks';

describe('a file before it is sent', () => {
  it('may be any video', () => {
    expect(checkFile({ name: 'IMG_0412.MOV', type: 'video/quicktime', size: 1000 })).toBeNull();
  });

  it('is let through when its kind is unknown, for the API looks inside', () => {
    expect(checkFile({ name: 'IMG_0412.MOV', type: '', size: 1000 })).toBeNull();
    expect(checkFile({ name: 'clip', type: '', size: 1000 })).toBeNull();
    expect(checkFile({ name: 'clip', type: 'application/octet-stream', size: 1000 })).toBeNull();
  });

  it('is refused when it is something else', () => {
    expect(checkFile({ name: 'knees.jpg', type: 'image/jpeg', size: 1000 })?.message).toBe(
      'This file is not a video.',
    );
  });

  it('is refused when it is empty or too large, by its size', () => {
    expect(checkFile({ name: 'a.mp4', type: 'video/mp4', size: 0 })?.message).toBe('The file is empty.');
    expect(checkFile({ name: 'a.mp4', type: 'video/mp4', size: CLIP_MAX_BYTES })).toBeNull();
    expect(checkFile({ name: 'a.mp4', type: 'video/mp4', size: CLIP_MAX_BYTES + 1 })?.message).toContain(
      '524 MB',
    );
  });
});

describe('the length of a clip', () => {
  it('says how long is allowed when it is too long', () => {
    expect(checkVideo({ durationMs: 190_000, width: 1080 })?.message).toBe(
      'The clip is 3 min 10 s long; at most 2 min can be sent.',
    );
  });

  it('is fine up to the limit, and where it could not be read', () => {
    expect(checkVideo({ durationMs: 120_000, width: 1080 })).toBeNull();
    expect(checkVideo({ durationMs: null, width: null })).toBeNull();
  });

  it('must show a rep', () => {
    expect(checkVideo({ durationMs: 300, width: 1080 })?.message).toBe('The clip is too short to see a rep.');
  });

  it('is said in minutes and seconds', () => {
    expect([45_000, 60_000, 61_200].map(lengthWords)).toEqual(['45 s', '1 min', '1 min 1 s']);
  });
});
