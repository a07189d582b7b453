import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { shopSchema, type Shop } from '#shared/api/shops'
import { Button } from '../../../components/button'
import { TextField } from '../../../components/field'
import { Form, FormActions, FormError, FormPart } from '../../../components/form'
import { useProblemFields } from '../../../lib/use-problem-fields'
import { useChangeShop } from '../api/change-shop'
import { UnitFields } from './unit-fields'

const settingsSchema = shopSchema.omit({ id: true })

/** Digits become a number; anything else stays text, for the schema to say what is wrong. */
const wholeNumber = (typed: unknown) => (typeof typed === 'string' && /^\s*\d+\s*$/.test(typed) ? Number(typed) : typed)

/** Name, units and the limits that hold for every test of a shop. */
export function ShopSettingsForm({ shop, mayChange }: { shop: Shop; mayChange: boolean }) {
  const change = useChangeShop(shop.id)
  const { id: _id, ...settings } = shopSchema.parse(shop)
  const form = useForm({ resolver: zodResolver(settingsSchema), defaultValues: settings, disabled: !mayChange })
  const { errors, submitCount } = form.formState
  const showProblem = useProblemFields(form)
  return (
    <Form
      className="gap-0"
      onSubmit={form.handleSubmit((request) => change.mutate(request, { onSuccess: () => form.reset(request), onError: showProblem }))}
    >
      <FormError message={errors.root?.message} attempt={submitCount} />
      <FormPart title="Name" note="Prints on every record and tag from now on; signed records keep the old one.">
        <TextField className="tablet:col-span-2" label="Name of the shop" message={errors.name?.message} {...form.register('name')} />
      </FormPart>
      <FormPart title="Units" note="What screens show first. What was typed keeps its own unit.">
        <UnitFields register={form.register} errors={errors} />
      </FormPart>
      <FormPart title="Walk-down" note="How long an examination counts, and when a build is walked down as if new.">
        <TextField
          label="Examined within, hours"
          inputMode="numeric"
          hint="Before the first load."
          message={errors.walkDownHours?.message}
          {...form.register('walkDownHours', { setValueAs: wholeNumber })}
        />
        <TextField
          label="Build stood still, days"
          inputMode="numeric"
          hint="After so long, every joint is examined again."
          message={errors.buildPauseDays?.message}
          {...form.register('buildPauseDays', { setValueAs: wholeNumber })}
        />
      </FormPart>
      {mayChange ? (
        <FormActions>
          <Button type="submit" kind="next" busy={change.isPending && 'Keeping them'}>
            Keep these settings
          </Button>
          <p role="status" className="font-medium text-sound">
            {change.isSuccess && 'Kept.'}
          </p>
        </FormActions>
      ) : (
        <p className="border-t-2 border-ink pt-4 text-graphite">Only the owner changes these.</p>
      )}
    </Form>
  )
}
