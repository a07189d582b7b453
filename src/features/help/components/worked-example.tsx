import { useId } from 'react'
import { Section } from '../../../components/page'
import type { Example, Step } from '../topic'

function StepLine({ step, number }: { step: Step; number: number }) {
  const id = useId()
  return (
    <li aria-labelledby={id} className="grid grid-cols-[2rem_1fr] border-b border-hairline py-2">
      <span aria-hidden="true" className="text-graphite">
        {number}
      </span>
      <div className="grid min-w-0 gap-x-4 tablet:grid-cols-[1fr_auto]">
        <span id={id} className="font-medium">
          {step.what}
        </span>
        <strong className="font-semibold whitespace-nowrap tablet:text-right">{step.value}</strong>
        <span className="font-condensed text-graphite tablet:col-span-2">{step.sum}</span>
        {step.note !== undefined && <span className="tablet:col-span-2">{step.note}</span>}
      </div>
    </li>
  )
}

/** The formula with numbers in it, step by step; worked out now, by the functions that work out a test. */
export function WorkedExample({ example }: { example: Example }) {
  return (
    <Section title="Worked example" note="an invented press, the same on every page">
      <dl className="grid gap-x-6 border-t border-hairline font-condensed tablet:grid-cols-2">
        {example.given.map(([name, value]) => (
          <div key={name} className="flex justify-between gap-x-4 border-b border-hairline py-1">
            <dt className="text-graphite">{name}</dt>
            <dd className="text-right">{value}</dd>
          </div>
        ))}
      </dl>
      <ol className="mt-3 border-t border-rule">
        {example.steps.map((step, index) => (
          <StepLine key={step.what} step={step} number={index + 1} />
        ))}
      </ol>
      <p className="mt-3 max-w-prose">{example.so}</p>
    </Section>
  )
}
