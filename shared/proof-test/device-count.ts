/** How far a device's own count of a ledger has come, and which of its numbers never arrived. */
export interface DeviceCount {
  highest: number
  /** Runs of missing numbers below the highest, each with its first and last, in order. */
  missing: readonly (readonly [number, number])[]
}

const NONE: DeviceCount = { highest: 0, missing: [] }

/**
 * Counts one entry of a device: `deviceSeq` counts from 1, so what it leaps over is missing until it arrives. An entry
 * may arrive late, after higher ones; a number that is here already changes nothing. Never throws.
 */
export function countDevice(before: DeviceCount = NONE, deviceSeq: number): DeviceCount {
  const { highest, missing } = before
  if (deviceSeq > highest) {
    return { highest: deviceSeq, missing: deviceSeq > highest + 1 ? [...missing, [highest + 1, deviceSeq - 1]] : missing }
  }
  if (!missing.some(([first, last]) => deviceSeq >= first && deviceSeq <= last)) return before
  return {
    highest,
    missing: missing.flatMap(([first, last]): [number, number][] => {
      if (deviceSeq < first || deviceSeq > last) return [[first, last]]
      const parts: [number, number][] = [
        [first, deviceSeq - 1],
        [deviceSeq + 1, last],
      ]
      return parts.filter(([from, to]) => from <= to)
    }),
  }
}
