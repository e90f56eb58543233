import { seededRandom } from './seeded-random.ts';

/** Plays a device that wakes for beacons, one run of at most four misses after the other. */
export function playBeacons(setup: {
  beacons: number;
  seed: number;
  missed: number;
  /** Guard on one side by how many beacons were missed just before, s. */
  guardHalfS: (missedBefore: number) => number;
  beaconS: number;
}): { listenS: number; receiveS: number; isLost: boolean }[] {
  const random = seededRandom(setup.seed);
  let missedBefore = 0;
  return Array.from({ length: setup.beacons }, () => {
    const halfS = setup.guardHalfS(missedBefore);
    if (random() >= setup.missed) {
      missedBefore = 0;
      // The drift lies anywhere between the ends of the guard.
      return { listenS: halfS + (2 * random() - 1) * halfS, receiveS: setup.beaconS, isLost: false };
    }
    missedBefore = missedBefore === 3 ? 0 : missedBefore + 1;
    return { listenS: 2 * halfS + setup.beaconS, receiveS: 0, isLost: missedBefore === 0 };
  });
}
