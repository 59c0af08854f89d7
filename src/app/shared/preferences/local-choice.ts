/**
 * Reads and keeps one small choice of a person in this browser. Where the browser forbids storage (private modes,
 * full disks) the choice holds until the page is left; nothing else depends on it.
 */
export const localChoice = {
  read(key: string): string | null {
    try {
      return localStorage.getItem(key);
    } catch {
      return null;
    }
  },
  write(key: string, value: string | null): void {
    try {
      if (value === null) localStorage.removeItem(key);
      else localStorage.setItem(key, value);
    } catch {
      // Storage is refused: the choice is kept in memory by whoever holds it.
    }
  },
};
