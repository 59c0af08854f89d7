/** One caption; `endMs` is after `startMs`. */
export interface Caption {
  readonly startMs: number;
  readonly endMs: number;
  readonly text: string;
}

const two = (n: number) => String(n).padStart(2, '0');

/** `HH:MM:SS.mmm`; hours take more digits when they need them. */
export function vttTimestamp(ms: number): string {
  const whole = Math.round(ms);
  const seconds = Math.floor(whole / 1000);
  return `${two(Math.floor(seconds / 3600))}:${two(Math.floor(seconds / 60) % 60)}:${two(seconds % 60)}.${String(whole % 1000).padStart(3, '0')}`;
}

/** Text that a WebVTT reader shows as it was written: no tags, no blank line (it would end the caption), no NUL. */
function vttText(text: string): string {
  return text
    .replaceAll('\u0000', '\uFFFD')
    .replace(/\r\n?/g, '\n')
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .split('\n')
    .map((line) => line.trim())
    .filter((line) => line !== '')
    .join('\n');
}

/** A WebVTT file (W3C WebVTT, authoring syntax) of the captions in the order of their start. */
export function webVtt(captions: readonly Caption[]): string {
  const cues = [...captions]
    .sort((a, b) => a.startMs - b.startMs || a.endMs - b.endMs)
    .map(
      ({ startMs, endMs, text }) =>
        `${vttTimestamp(startMs)} --> ${vttTimestamp(Math.max(endMs, startMs + 1))}\n${vttText(text)}\n`,
    );
  return ['WEBVTT\n', ...cues].join('\n');
}
