/**
 * npm passes Ctrl-C on to us although the terminal has told us already: two signals within a few
 * milliseconds for one press. A person who presses again needs longer than that.
 */
const samePress = 500;

interface Stopping {
  /** The first time: in order. */
  stop(): void;
  /** When asked again: at once. */
  force(): void;
  now?: () => number;
}

/** The handler of signals to end: in order when first asked, by force when asked again. */
export function stopSignals({ stop, force, now = () => performance.now() }: Stopping): () => void {
  let asked: number | undefined;
  return () => {
    if (asked === undefined) {
      asked = now();
      stop();
    } else if (now() - asked > samePress) {
      force();
    }
  };
}
