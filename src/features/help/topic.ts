import type { ComponentType, ReactNode } from 'react'
import type { HelpTopic } from '../../lib/help-topics'

/** A formula as it is set, and as it is read out. */
export interface Formula {
  maths: ReactNode
  say: string
  /** What it gives, in a few words before it. */
  gives: string
}

export interface SymbolRow {
  sign: ReactNode
  /** The sign as it is read out. */
  say: string
  meaning: string
  unit: string
}

/** One line of a worked example. Figures come from the shared functions; nothing here is typed in. */
export interface Step {
  what: string
  /** The sum with its numbers in it. */
  sum: string
  value: string
  note?: string
}

export interface Example {
  given: readonly (readonly [name: string, value: string])[]
  steps: readonly Step[]
  /** What one does with it. */
  so: string
}

export interface UsedIn {
  where: string
  to?: string
}

/** One page of help. */
export interface Topic {
  slug: HelpTopic
  title: string
  /** In the trade's words. */
  question: string
  answer: string
  formulas: readonly Formula[]
  symbols: readonly SymbolRow[]
  Drawing: ComponentType
  drawing: { title: string; note: string }
  example(): Example
  usedIn: readonly UsedIn[]
  sources: readonly string[]
  /** Where force is decided: what to keep in mind. */
  cautions: readonly string[]
}
