import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { openShopRequestSchema } from '#shared/api/open-shop'
import { Button } from '../../../components/button'
import { PasswordField, TextField } from '../../../components/field'
import { Form, FormError } from '../../../components/form'
import { useProblemFields } from '../../../lib/use-problem-fields'
import { useOpenShop } from '../api/open-shop'
import { UnitFields } from './unit-fields'

/** A new shop and its owner, in one step. */
export function OpenShopForm({ onOpened }: { onOpened: () => void }) {
  const openShop = useOpenShop()
  const form = useForm({
    resolver: zodResolver(openShopRequestSchema),
    defaultValues: { shopName: '', ownerName: '', email: '', password: '', forceUnit: 'short-ton', pressureUnit: 'psi', lengthUnit: 'mm' },
  })
  const { errors, submitCount } = form.formState
  const showProblem = useProblemFields(form)
  return (
    <Form onSubmit={form.handleSubmit((request) => openShop.mutate(request, { onSuccess: onOpened, onError: showProblem }))}>
      <FormError message={errors.root?.message} attempt={submitCount} />
      <TextField label="Name of the shop" autoComplete="organization" message={errors.shopName?.message} {...form.register('shopName')} />
      <TextField
        label="Your name, as it prints on records"
        autoComplete="name"
        message={errors.ownerName?.message}
        {...form.register('ownerName')}
      />
      <div className="grid gap-4 tablet:grid-cols-2">
        <TextField
          label="E-mail"
          type="email"
          autoComplete="username"
          inputMode="email"
          autoCapitalize="none"
          spellCheck={false}
          message={errors.email?.message}
          {...form.register('email')}
        />
        <PasswordField label="Password" autoComplete="new-password" message={errors.password?.message} {...form.register('password')} />
      </div>
      <div className="grid gap-4 tablet:grid-cols-3">
        <UnitFields register={form.register} errors={errors} />
      </div>
      <Button
        type="submit"
        kind="next"
        wide
        className="mt-1 min-h-16 text-20 desktop:min-h-16 desktop:text-20"
        busy={openShop.isPending && 'Opening the shop'}
      >
        Open the shop
      </Button>
    </Form>
  )
}
