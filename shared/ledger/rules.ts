import type { Override } from './envelope'

/** What one numbered rule says against an entry. */
export interface Finding {
  rule: string
  says: string
  severity: 'refuse' | 'reason'
  /** An irregular entry against an interlock bars the conclusion "accepted". */
  interlock: boolean
}

export type Decision =
  { outcome: 'allowed' } | { outcome: 'needs-reason'; findings: Finding[] } | { outcome: 'refused'; findings: Finding[] }

/**
 * A numbered rule. `check` gets what is asked and returns a sentence that says what is wrong and what to
 * do, or null. `refuse` can't be got round; `reason` lets a person go on who writes down why.
 */
export interface Rule<Context> {
  id: string
  text: string
  severity: 'refuse' | 'reason'
  interlock?: boolean
  check: (context: Context) => string | null
}

/** Runs a table of rules; a rule whose reason was written down is quiet. */
export function decideByRules<Context>(rules: readonly Rule<Context>[], context: Context, overrides: readonly Override[]): Decision {
  const findings: Finding[] = []
  for (const rule of rules) {
    const says = rule.check(context)
    if (says === null) continue
    if (rule.severity === 'reason' && overrides.some((override) => override.rule === rule.id)) continue
    findings.push({ rule: rule.id, says, severity: rule.severity, interlock: rule.interlock ?? false })
  }
  if (findings.length === 0) return { outcome: 'allowed' }
  if (findings.some((finding) => finding.severity === 'refuse')) return { outcome: 'refused', findings }
  return { outcome: 'needs-reason', findings }
}

/** The rules that speak against an entry, for the mark that goes into the ledger. */
export function findingsOf(decision: Decision): Finding[] {
  return decision.outcome === 'allowed' ? [] : decision.findings
}
