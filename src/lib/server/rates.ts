import { Refusal } from './refusal.ts';

interface Bucket {
  left: number;
  at: number;
}

const SWEEP_AT = 20_000;

/** Token buckets in memory: `count` uses per `seconds` for each key, refilled evenly. */
export class RateLimits {
  readonly #buckets = new Map<string, Bucket>();
  readonly #factor: number;

  /** @param factor multiplies every limit. */
  constructor(factor = 1) {
    this.#factor = factor;
  }

  /** Takes one use. @throws Refusal rate with the seconds to wait. */
  take(key: string, count: number, seconds: number, message: string, time = Date.now()): void {
    const size = count * this.#factor;
    const bucket = this.#buckets.get(key) ?? { left: size, at: time };
    bucket.left = Math.min(size, bucket.left + ((time - bucket.at) / 1000) * (size / seconds));
    bucket.at = time;
    this.#buckets.set(key, bucket);
    if (this.#buckets.size > SWEEP_AT) this.#sweep(time);
    if (bucket.left < 1) throw new Refusal('rate', message, {}, Math.ceil((1 - bucket.left) * (seconds / size)));
    bucket.left -= 1;
  }

  /** Buckets untouched for an hour are full again, so they can be forgotten. */
  #sweep(time: number): void {
    for (const [key, { at }] of this.#buckets) if (time - at > 3_600_000) this.#buckets.delete(key);
  }
}
