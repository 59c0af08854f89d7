import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import type { ClipDto, LiftDto, View } from '@contract';
import { FilmSlot } from '../shared/film-slot/film-slot';
import { byteWords } from '../shared/upload-progress/byte-words';
import { bytesPerSecond, leftWords, timeLeftMs } from './send-rate';
import { IDLE, type Upload } from './upload';

/** One view: its picture, how its clip stands, and what can be done about it. */
@Component({
  selector: 'mf-clip-slot',
  imports: [FilmSlot],
  templateUrl: './clip-slot.html',
  styleUrl: './clip-slot.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ClipSlot {
  readonly view = input.required<View>();
  readonly brief = input.required<LiftDto['brief']>();
  readonly clip = input<ClipDto | null>(null);
  readonly upload = input<Upload>(IDLE);

  readonly chosen = output<File>();
  readonly cancelled = output();
  readonly again = output();
  readonly removed = output();

  protected readonly isSending = computed(() => this.upload().kind === 'sending');
  protected readonly sentPercent = computed(() => {
    const upload = this.upload();
    if (upload.kind !== 'sending' || upload.totalBytes === 0) return 0;
    return Math.floor(Math.min(1, upload.sentBytes / upload.totalBytes) * 100);
  });
  protected readonly sentWords = computed(() => {
    const upload = this.upload();
    if (upload.kind !== 'sending') return '';
    const bytes = `${byteWords(upload.sentBytes)} of ${byteWords(upload.totalBytes)}`;
    if (upload.totalBytes > 0 && upload.sentBytes >= upload.totalBytes)
      return `${bytes}; waiting for the receipt`;
    const rate = bytesPerSecond(upload.samples);
    const leftMs = timeLeftMs(upload.samples, upload.totalBytes);
    return [bytes, rate === null ? '' : `${byteWords(rate)}/s`, leftMs === null ? '' : leftWords(leftMs)]
      .filter(Boolean)
      .join(' · ');
  });
  protected readonly isPreparing = computed(() => {
    const state = this.clip()?.state;
    return state === 'uploaded' || state === 'processing';
  });
  protected readonly preparedPercent = computed(() => Math.round(Math.min(100, this.clip()?.progress ?? 0)));
  protected readonly clipProblem = computed(
    () => (this.upload().kind === 'idle' ? this.clip()?.problem : null) ?? null,
  );

  /** Said to screen readers when the stage changes, never with every byte. */
  protected readonly stage = computed(() => {
    const name = this.view() === 'front' ? 'Front' : 'Side';
    switch (this.upload().kind) {
      case 'checking':
        return `${name}: looking at the file.`;
      case 'sending':
        return `${name}: sending. Keep this page open.`;
      case 'stopped':
        return `${name}: the network dropped.`;
      case 'refused':
      case 'failed':
        return '';
      case 'idle':
        if (!this.clip()) return '';
        return this.isPreparing()
          ? `${name}: it has arrived and is being prepared.`
          : `${name}: it has arrived.`;
    }
  });

  protected take(event: Event): void {
    const field = event.target as HTMLInputElement;
    const file = field.files?.[0];
    // Emptied, so that choosing the same file again is noticed.
    field.value = '';
    if (file) this.chosen.emit(file);
  }
}
