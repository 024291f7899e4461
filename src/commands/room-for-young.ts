import { setFlagsFromString } from 'node:v8';

/**
 * Sets the room for young objects of threads that start from now on.
 *
 * @param least Megabytes at first.
 * @param most Megabytes up to which it grows.
 */
export function setRoomForYoung(least: number, most: number): void {
  setFlagsFromString(`--min-semi-space-size=${least}`);
  setFlagsFromString(`--max-semi-space-size=${most}`);
}
