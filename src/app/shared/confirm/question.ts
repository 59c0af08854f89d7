/** What is asked. Both answers are named by what they do, never "OK". */
export interface Question {
  heading: string;
  body: string;
  confirmLabel: string;
  cancelLabel: string;
}
