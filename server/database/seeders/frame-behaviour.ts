/** How one measuring point of an invented frame moves. Lengths in mm, forces in kN. */
export interface PointBehaviour {
  /** What the indicator shows before any load. */
  setTo: number
  /** mm per kN, as long as the frame is a spring. */
  compliance: number
  /** Slack that a small load takes up, and that comes back when the load is off. */
  slack: number
  /** What stays after the first full load. */
  bedsIn: number
}

/** How an invented frame behaves: a spring with a little slack, which beds in once and may give way. */
export interface FrameBehaviour {
  /** In the order of the test's measuring points. */
  points: readonly PointBehaviour[]
  /** Above this force every point moves so many times more for the same rise. */
  givesWay?: { above: number; times: number }
  /** Fraction of the pressure that leaks away in a minute of hold. */
  leak: number
  /** Fraction of the movement that a minute of hold adds. */
  creep: number
}

const SLACK_CLOSES_AT = 6

/** The frame through one leg of a test: what it has carried so far decides what stays. */
export class FrameUnderLoad {
  private highest = 0

  constructor(
    private readonly behaviour: FrameBehaviour,
    private readonly fullLoad: number,
  ) {}

  /** Pressure or force that is left after minutes of hold, of what it began with. */
  leftAfter(minutes: number): number {
    return 1 - this.behaviour.leak * minutes
  }

  /** What the indicator at a point stands at, in mm, with a force on (kN) for so many minutes. */
  standsAt(point: number, force: number, minutes = 0): number {
    const own = this.behaviour.points[point]
    if (!own) throw new RangeError(`The frame has no behaviour for measuring point ${point + 1}.`)
    this.highest = Math.max(this.highest, force)
    const { givesWay, creep } = this.behaviour
    const beyond = givesWay ? Math.max(0, force - givesWay.above) * (givesWay.times - 1) : 0
    const spring = own.compliance * (force + beyond) * (1 + creep * minutes)
    const slack = own.slack * (1 - Math.exp(-force / SLACK_CLOSES_AT))
    const bedded = own.bedsIn * Math.min(1, this.highest / this.fullLoad) ** 2
    return own.setTo + spring + slack + bedded
  }
}

/** A value as somebody types it from an instrument that reads in steps, all in one unit. */
export function asRead(value: number, increment: number, decimals: number): string {
  const text = (Math.round(value / increment) * increment).toFixed(decimals)
  return Number(text) === 0 ? text.replace('-', '') : text
}
