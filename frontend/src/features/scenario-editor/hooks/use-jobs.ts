import { useEffect, useState } from 'react';

/** How long jobs wait for the next keystroke, and how long they keep the page busy at a time, ms. */
const WAIT_MS = 80;
const SLICE_MS = 10;

/** Jobs of one kind with what they are for, so that results are never shown for something else. */
export interface JobSet<S, T> {
  subject: S;
  jobs: readonly (() => T)[];
}

/**
 * Runs jobs a few at a time, so that typing never waits for them.
 *
 * @param set The jobs; a set of another identity starts anew.
 * @returns The newest set that is done, with its results, which may be of an older one; null while none is.
 */
export function useJobs<S, T>(set: JobSet<S, T>): { set: JobSet<S, T>; results: T[] } | null {
  const [done, setDone] = useState<{ set: JobSet<S, T>; results: T[] } | null>(null);
  useEffect(() => {
    const results: T[] = [];
    const work = (): void => {
      const until = performance.now() + SLICE_MS;
      do {
        const job = set.jobs[results.length];
        if (!job) {
          setDone({ set, results });
          return;
        }
        results.push(job());
      } while (performance.now() < until);
      timer = setTimeout(work, 0);
    };
    let timer = setTimeout(work, WAIT_MS);
    return () => clearTimeout(timer);
  }, [set]);
  return done;
}
