import { seededRandom } from './seeded-random.ts';

/** Plays frames sent in shared slots, each with its retries; probabilities as in `sharedSlots`. */
export function playSharedSlots(setup: {
  frames: number;
  seed: number;
  collision: number;
  frameLoss: number;
  ackLoss: number;
  minBE: number;
  maxBE: number;
  retries: number;
}): { transmissions: number; skippedSlots: number; isAcknowledged: boolean; isReceived: boolean }[] {
  const random = seededRandom(setup.seed);
  return Array.from({ length: setup.frames }, () => {
    const frame = { transmissions: 0, skippedSlots: 0, isAcknowledged: false, isReceived: false };
    let exponent = setup.minBE;
    while (!frame.isAcknowledged && frame.transmissions <= setup.retries) {
      if (frame.transmissions > 0) {
        exponent = Math.min(exponent + 1, setup.maxBE);
        frame.skippedSlots += Math.floor(random() * 2 ** exponent);
      }
      frame.transmissions += 1;
      const arrives = random() >= setup.collision && random() >= setup.frameLoss;
      if (!arrives) continue;
      frame.isReceived = true;
      frame.isAcknowledged = random() >= setup.ackLoss;
    }
    return frame;
  });
}
