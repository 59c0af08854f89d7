/** Why a member's file cannot be shown: a closed list, stored with the take. */
export const UNPLAYABLE_REASONS = [
  'empty',
  'not-video',
  'unsupported-container',
  'unsupported-codec',
  'no-picture',
  'encrypted',
  'damaged',
  'too-short',
  'too-long',
  'too-few-frames',
  'too-many-frames',
  'too-big-picture',
  'too-small-picture',
  'too-many-streams',
  'too-heavy',
  'bad-trim',
] as const;

/** One of {@link UNPLAYABLE_REASONS}. */
export type UnplayableReason = (typeof UNPLAYABLE_REASONS)[number];

/** What the member reads: what is wrong, and what to do. */
export interface Explanation {
  message: string;
  remedy: string;
}

/** The one place where a refusal is put into words. */
export const EXPLANATIONS: Readonly<Record<UnplayableReason, Explanation>> = {
  empty: {
    message: 'The file is empty.',
    remedy: 'Choose the clip again. If it stays empty, film the lift once more.',
  },
  'not-video': {
    message: 'This file is not a video.',
    remedy: 'Choose a video from your phone’s camera roll, not a photo, a document or a link.',
  },
  'unsupported-container': {
    message: 'This kind of video file cannot be read.',
    remedy: 'Send the clip as your phone saved it: an MP4, MOV, 3GP or WebM file.',
  },
  'unsupported-codec': {
    message: 'The picture in this file is stored in a way that cannot be read.',
    remedy: 'Film with your phone’s own camera, or here in the app, and send that clip.',
  },
  'no-picture': {
    message: 'The file has no moving picture in it.',
    remedy: 'It may be a sound recording. Choose the video of the lift, or film it once more.',
  },
  encrypted: {
    message: 'This video is protected and cannot be opened.',
    remedy: 'Send a clip that you filmed yourself, straight from the camera roll.',
  },
  damaged: {
    message: 'The video is damaged: part of it is missing or cannot be read.',
    remedy:
      'Check that it plays to the end on your phone and send it again. If it does not play, film the lift once more.',
  },
  'too-short': {
    message: 'The clip is too short to see a rep.',
    remedy: 'Film the whole lift, from before the first rep to after the last.',
  },
  'too-long': {
    message: 'The clip is too long.',
    remedy: 'Trim it to the reps that your coach asked for and send it again.',
  },
  'too-few-frames': {
    message: 'The clip has too few pictures a second to see the movement.',
    remedy: 'Turn off time-lapse on your phone’s camera and film the lift once more.',
  },
  'too-many-frames': {
    message: 'The clip has more pictures a second than can be used.',
    remedy: 'Film at normal speed, or with slow motion at 240 pictures a second at most.',
  },
  'too-big-picture': {
    message: 'The picture is larger than 4K.',
    remedy: 'Set your phone’s camera to 1080p or 4K and film the lift once more.',
  },
  'too-small-picture': {
    message: 'The picture is too small to see the movement.',
    remedy: 'Set your phone’s camera to 720p or 1080p and film the lift once more.',
  },
  'too-many-streams': {
    message: 'The file has too many tracks in it.',
    remedy: 'Send the clip as your phone saved it, not one put together in an editor.',
  },
  'too-heavy': {
    message: 'The clip takes more work to read than any phone’s clip should.',
    remedy: 'Film at 1080p, trim to the reps that your coach asked for, and send that clip.',
  },
  'bad-trim': {
    message: 'The start and end that you set leave nothing to show.',
    remedy: 'Set the start before the first rep and the end after the last, at least half a second apart.',
  },
};

/** A file that will never play, whatever is tried again: the member must send another. */
export class UnplayableError extends Error {
  override readonly name = 'UnplayableError';
  readonly remedy: string;

  /**
   * @param reason what is wrong; chooses the message and the remedy that the member reads
   * @param detail what the tools said, for the log and never for the member
   */
  constructor(
    readonly reason: UnplayableReason,
    readonly detail: string,
  ) {
    super(EXPLANATIONS[reason].message);
    this.remedy = EXPLANATIONS[reason].remedy;
  }
}
