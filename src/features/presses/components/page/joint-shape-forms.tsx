import { zodResolver } from '@hookform/resolvers/zod'
import { useEffect, useMemo } from 'react'
import { useFieldArray, useForm, useWatch, type UseFormReturn } from 'react-hook-form'
import { v7 as newId } from 'uuid'
import { z } from 'zod'
import { PRESS_PAYLOADS } from '#shared/press/entries'
import { jointSchema, type Joint } from '#shared/press/model'
import { jointPlaces } from '#shared/press/places'
import type { PressJoint, PressState } from '#shared/press/state'
import { Button } from '../../../../components/button'
import { DateField, TextArea, TextField } from '../../../../components/field'
import { Fit } from '../../../../components/fit'
import { Form, FormActions, FormError } from '../../../../components/form'
import { drawnPress } from '#shared/drawing/drawn-press'
import { JointDrawing, type DrawnJoint } from '../../../../components/instruments/joint-drawing'
import { SelectField } from '../../../../components/select-field'
import { usePhone } from '../../../../lib/use-media'
import { useProblemFields } from '../../../../lib/use-problem-fields'
import type { PressWriting } from '../../api/append-to-press'
import { jointChoices, makeUpChoices } from '../words'
import { JointEffect, type JointDeed } from './joint-effect'
import type { Sending } from './sending'

/** The spot that is chosen on the drawing while a joint is put somewhere; null while nobody is putting one. */
export type Spotting = { at: string | null; choose: (place: string | null) => void; begin: (place: string | null) => void; end: () => void }

export type ShapeProps = Sending & { state: PressState; onDone: () => void; spotting: Spotting }

const whySchema = PRESS_PAYLOADS['joint-retired'].shape.why
const listSchema = z.object({ joints: z.array(jointSchema), why: z.string().trim().max(500) })
const splitSchema = listSchema.extend({ why: whySchema })
type Listed = z.infer<typeof listSchema>

const nextNumber = (joints: readonly PressJoint[]): number => Math.max(0, ...joints.map(({ number }) => number)) + 1

/** The spot is chosen on the drawing while a form is open that asks for one. */
function useSpot({ begin, end }: Spotting, first: string | null, asked = true) {
  useEffect(() => {
    if (!asked) return undefined
    begin(first)
    return end
    // Once, when the form opens: after that the drawing and the list beside it say where.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [])
}

const NO_JOINTS: DrawnJoint[] = []

function PlaceField({ state, spotting }: Pick<ShapeProps, 'state' | 'spotting'>) {
  const { description } = state
  const phone = usePhone()
  const press = useMemo(() => description && drawnPress(description), [description])
  const choices = description ? jointPlaces[description.kind].map(({ place, label }) => ({ value: place, label })) : []
  return (
    <div className="grid gap-3">
      {/* On a phone the plate is far up the page: here it is again, where the form is. */}
      {phone && press && (
        <Fit className="ground-dye -mx-4 h-[380px]" initial={{ width: 358, height: 380 }}>
          {(size) => (
            <JointDrawing press={press} joints={NO_JOINTS} placing={{ place: spotting.at, onPlace: spotting.choose }} size={size} />
          )}
        </Fit>
      )}
      <SelectField
        label="Where it stands"
        hint="Tap a cross on the drawing, or choose here."
        nothing="Beside the drawing"
        choices={choices}
        value={spotting.at ?? ''}
        onChange={(event) => spotting.choose(event.target.value || null)}
      />
    </div>
  )
}

type FieldsProps = { form: UseFormReturn<Listed>; index: number; state: PressState; whole: boolean; madeUp: boolean }

/** What is known of one joint; `whole` asks for what it holds together too. */
function JointFields({ form, index, state, whole, madeUp }: FieldsProps) {
  const { register, formState, control } = form
  const errors = formState.errors.joints?.[index]
  const kind = useWatch({ control, name: `joints.${index}.kind` })
  const members = (state.description?.members ?? []).map(({ id, name }) => ({ value: id, label: name }))
  const between = errors?.between
  return (
    <div className="grid items-start gap-x-4 gap-y-3 tablet:grid-cols-2">
      <TextField
        label="Number"
        inputMode="numeric"
        message={errors?.number && 'Give it a number of its own, 1 to 199.'}
        {...register(`joints.${index}.number`, { valueAsNumber: true })}
      />
      <TextField label="Name" autoComplete="off" message={errors?.name?.message} {...register(`joints.${index}.name`)} />
      {whole && (
        <>
          <SelectField
            label="Holds"
            nothing="Choose a member"
            choices={members}
            message={between?.[0] && 'Choose a member.'}
            {...register(`joints.${index}.between.0`)}
          />
          <SelectField
            label="to"
            nothing="Choose a member"
            choices={members}
            message={(between?.[1] && 'Choose a member.') ?? between?.root?.message ?? between?.message}
            {...register(`joints.${index}.between.1`)}
          />
          <SelectField label="By" choices={jointChoices} {...register(`joints.${index}.kind`)} />
        </>
      )}
      {madeUp && <SelectField label="Made up" choices={makeUpChoices} {...register(`joints.${index}.makeUp`)} />}
      <TextField
        label="Size and form"
        optional
        placeholder={kind === 'weld' ? 'fillet 8 mm, both sides' : kind === 'pin' ? '34 mm, double shear' : 'M30, bottomed'}
        message={errors?.detail?.message}
        {...register(`joints.${index}.detail`)}
      />
      <TextField
        label={kind === 'weld' ? 'Filler' : 'Fastener'}
        optional
        placeholder={kind === 'weld' ? 'E7018, 3.2 mm' : 'property class 10.9'}
        message={errors?.filler?.message}
        {...register(`joints.${index}.filler`)}
      />
      <TextField label="Made by" optional autoComplete="off" message={errors?.madeBy?.message} {...register(`joints.${index}.madeBy`)} />
      <DateField
        label="Made on"
        optional
        message={errors?.madeOn?.message}
        {...register(`joints.${index}.madeOn`, { setValueAs: (value: string | null) => value || null })}
      />
    </div>
  )
}

type ListProps = ShapeProps & { deed: Exclude<JointDeed, 'place' | 'retire'>; joint: PressJoint | null; first: Joint[] }

/** One form for a joint that is added, described anew, or split into several. */
function JointListForm({ deed, joint, first, state, send, busy, onDone, spotting }: ListProps) {
  const form = useForm<Listed>({
    resolver: zodResolver(deed === 'split' ? splitSchema : listSchema),
    defaultValues: { joints: first, why: '' },
  })
  const parts = useFieldArray({ control: form.control, name: 'joints', keyName: 'key' })
  const { errors, submitCount } = form.formState
  const onError = useProblemFields(form)
  useSpot(spotting, null, deed === 'add')
  const draftsOf = ({ joints, why }: Listed): PressWriting[] => {
    if (deed === 'split' && joint) return [{ kind: 'joint-split', payload: { jointId: joint.id, into: joints, why } }]
    if (deed === 'add') return joints.map((one) => ({ kind: 'joint-added', payload: { joint: { ...one, place: spotting.at } } }))
    return joints.map((one) => ({ kind: 'joint-described', payload: { joint: one, why } }))
  }
  const called = joint ? `Joint ${joint.number}` : 'The joint'
  return (
    <Form onSubmit={form.handleSubmit((values) => send(draftsOf(values), { onSuccess: onDone, onError }))}>
      <FormError message={errors.root?.message} attempt={submitCount} />
      {parts.fields.map((field, index) => (
        <fieldset key={field.key} className={deed === 'split' ? 'border-t border-rule pt-3' : ''}>
          {deed === 'split' && (
            <legend className="flex w-full items-center justify-between pr-2 font-semibold">
              Joint {joint?.number}, part {index + 1}
              {parts.fields.length > 2 && (
                <Button size="line" onClick={() => parts.remove(index)}>
                  Take out part {index + 1}
                </Button>
              )}
            </legend>
          )}
          <JointFields form={form} index={index} state={state} whole={deed === 'add'} madeUp={deed !== 'describe'} />
        </fieldset>
      ))}
      {deed === 'split' && parts.fields.length < 8 && (
        <Button size="line" onClick={() => parts.append(partOf(first[0], form.getValues('joints'), state.joints))}>
          One more part
        </Button>
      )}
      {deed === 'add' && <PlaceField state={state} spotting={spotting} />}
      {deed !== 'add' && (
        <TextArea
          label={deed === 'split' ? 'Why it is split' : 'Why'}
          optional={deed === 'describe'}
          rows={2}
          message={errors.why?.message}
          {...form.register('why')}
        />
      )}
      <JointEffect state={state} joint={joint} deed={deed} />
      <FormActions>
        <Button type="submit" busy={busy && 'Writing it down'}>
          {deed === 'add'
            ? 'The joint is there'
            : deed === 'split'
              ? `${called} is ${parts.fields.length} joints`
              : `${called} is described`}
        </Button>
        <Button onClick={onDone}>Leave it</Button>
      </FormActions>
    </Form>
  )
}

/** The next part of a joint: what is so of the whole, under a number of its own. */
function partOf(whole: Joint | undefined, given: readonly { number: number }[], joints: readonly PressJoint[]): Joint {
  if (!whole) throw new Error('A joint that is split has a first part.')
  const number = Math.max(nextNumber(joints), ...given.map((one) => one.number + 1))
  return { ...whole, id: newId(), number, name: '', strength: null }
}

export function AddJointForm(props: ShapeProps) {
  const first: Joint = {
    id: newId(),
    number: nextNumber(props.state.joints),
    name: '',
    kind: 'weld',
    detail: '',
    between: ['', ''],
    makeUp: 'open',
    madeBy: '',
    filler: '',
    madeOn: null,
    place: null,
  }
  return <JointListForm {...props} deed="add" joint={null} first={[first]} />
}

export function DescribeJointForm({ joint, ...props }: ShapeProps & { joint: PressJoint }) {
  return <JointListForm {...props} deed="describe" joint={joint} first={[jointSchema.parse(joint)]} />
}

export function SplitJointForm({ joint, ...props }: ShapeProps & { joint: PressJoint }) {
  const whole: Joint = { ...jointSchema.parse(joint), id: newId(), number: nextNumber(props.state.joints), strength: null }
  return <JointListForm {...props} deed="split" joint={joint} first={[whole, partOf(whole, [whole], props.state.joints)]} />
}

export function RetireJointForm({ joint, state, send, busy, onDone }: ShapeProps & { joint: PressJoint }) {
  const form = useForm({ resolver: zodResolver(z.object({ why: whySchema })), defaultValues: { why: '' } })
  const { errors, submitCount } = form.formState
  const onError = useProblemFields(form)
  return (
    <Form
      onSubmit={form.handleSubmit(({ why }) =>
        send([{ kind: 'joint-retired', payload: { jointId: joint.id, why } }], { onSuccess: onDone, onError }),
      )}
    >
      <FormError message={errors.root?.message} attempt={submitCount} />
      <TextArea label={`Why joint ${joint.number} is no longer there`} rows={2} message={errors.why?.message} {...form.register('why')} />
      <JointEffect state={state} joint={joint} deed="retire" />
      <FormActions>
        <Button type="submit" busy={busy && 'Writing it down'}>
          Joint {joint.number} is retired
        </Button>
        <Button onClick={onDone}>Leave it</Button>
      </FormActions>
    </Form>
  )
}

export function PlaceJointForm({ joint, state, send, busy, onDone, spotting }: ShapeProps & { joint: PressJoint }) {
  const form = useForm({ defaultValues: {} })
  const { errors, submitCount } = form.formState
  const onError = useProblemFields(form)
  useSpot(spotting, joint.place)
  return (
    <Form
      onSubmit={form.handleSubmit(() =>
        send([{ kind: 'joint-placed', payload: { jointId: joint.id, place: spotting.at } }], { onSuccess: onDone, onError }),
      )}
    >
      <FormError message={errors.root?.message} attempt={submitCount} />
      <PlaceField state={state} spotting={spotting} />
      <JointEffect state={state} joint={joint} deed="place" />
      <FormActions>
        <Button type="submit" busy={busy && 'Writing it down'}>
          Joint {joint.number} stands there
        </Button>
        <Button onClick={onDone}>Leave it</Button>
      </FormActions>
    </Form>
  )
}
