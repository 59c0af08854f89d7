import { parseTempo, secondsPerRep } from '@calc/tempo';

function pause(seconds: number, where: string): string {
  return seconds === 0 ? `no pause at the ${where}` : `${seconds} s at the ${where}`;
}

/**
 * A written tempo read out: `40X0` is "4 s down, no pause at the bottom, up as fast as you can control, no pause at the
 * top; 4 s a rep and the way up". Null for what is no tempo.
 */
export function tempoWords(written: string): string | null {
  const tempo = parseTempo(written.trim().toUpperCase());
  if (!tempo) return null;
  const { downS, bottomS, upS, topS } = tempo;
  const down = downS === 0 ? 'down without counting' : `${downS} s down`;
  const up =
    upS === 'X' ? 'up as fast as you can control' : upS === 0 ? 'up without counting' : `${upS} s up`;
  const seconds = secondsPerRep(tempo, 0);
  const each = upS === 'X' ? `${seconds} s a rep and the way up` : `${seconds} s a rep`;
  return `${down}, ${pause(bottomS, 'bottom')}, ${up}, ${pause(topS, 'top')}; ${each}`;
}
