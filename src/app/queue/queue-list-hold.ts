import { Directive, output } from '@angular/core';

/** Tells when a list is in use (pointer over it, or focus inside), so that nothing moves under the hand. */
@Directive({
  selector: '[mfQueueListHold]',
  host: {
    '(pointerenter)': 'point($event)',
    '(pointerleave)': 'unpoint()',
    '(focusin)': 'focus()',
    '(focusout)': 'blur($event)',
  },
})
export class QueueListHold {
  readonly heldChange = output<boolean>();

  private isPointed = false;
  private isFocused = false;

  protected point(event: PointerEvent): void {
    // A finger is over the list only while it scrolls.
    if (event.pointerType === 'touch') return;
    this.isPointed = true;
    this.tell();
  }

  protected unpoint(): void {
    this.isPointed = false;
    this.tell();
  }

  protected focus(): void {
    this.isFocused = true;
    this.tell();
  }

  protected blur(event: FocusEvent): void {
    const list = event.currentTarget;
    if (list instanceof Node && event.relatedTarget instanceof Node && list.contains(event.relatedTarget))
      return;
    this.isFocused = false;
    this.tell();
  }

  private tell(): void {
    this.heldChange.emit(this.isPointed || this.isFocused);
  }
}
