/** The end of a hold is heard and felt, besides being written. Where the device has no sound or motor, the word is left. */
let sound: AudioContext | null = null

/** Browsers give sound only after a touch: called from one, so that the end of a hold can be heard. */
export function readyAlarm(): void {
  if (typeof AudioContext === 'undefined') return
  sound ??= new AudioContext()
  if (sound.state === 'suspended') void sound.resume()
}

function tone(context: AudioContext, from: number, frequency: number): void {
  const oscillator = context.createOscillator()
  const gain = context.createGain()
  oscillator.frequency.value = frequency
  gain.gain.setValueAtTime(0.4, from)
  gain.gain.setTargetAtTime(0, from + 0.22, 0.03)
  oscillator.connect(gain).connect(context.destination)
  oscillator.start(from)
  oscillator.stop(from + 0.4)
}

export type AlarmKind = 'hold over' | 'pause' | 'stop'

/** How often and how high (Hz) each sounds: a stop is told from the rest without looking. */
const TONES: Record<AlarmKind, { count: number; frequency: number }> = {
  'hold over': { count: 3, frequency: 880 },
  pause: { count: 2, frequency: 1100 },
  stop: { count: 5, frequency: 1320 },
}

/** Three even tones when a hold or a wait is over, two when somebody else paused, five high ones when somebody called stop. */
export function soundAlarm(kind: AlarmKind): void {
  const { count, frequency } = TONES[kind]
  if ('vibrate' in navigator) navigator.vibrate(Array.from({ length: count }, () => [220, 120]).flat())
  readyAlarm()
  if (!sound) return
  for (let index = 0; index < count; index += 1) tone(sound, sound.currentTime + index * 0.34, frequency)
}
