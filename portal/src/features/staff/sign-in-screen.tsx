import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useForm } from 'react-hook-form'
import { useNavigate } from 'react-router-dom'
import { issuesByField } from '../../api/api-error.ts'
import { SendButton } from '../../components/send-button.tsx'
import { FormFailure } from '../../components/form-failure.tsx'
import { Band, Sheet } from '../../components/sheet.tsx'
import { TextField } from '../../components/text-field.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { noteSignedIn } from '../../api/signed-in.ts'
import { staffSessionQuery, staffSignIn } from './queries.ts'

const words = { labels: { mail: 'Mail address', password: 'Password' } }

export function StaffSignInScreen() {
  const client = useQueryClient()
  const navigate = useNavigate()
  const { register, handleSubmit } = useForm({ defaultValues: { mail: '', password: '' } })
  const start = useMutation({
    mutationFn: staffSignIn,
    onSuccess: async (session) => {
      client.removeQueries({ queryKey: ['staff'] })
      noteSignedIn('staff', true)
      client.setQueryData(staffSessionQuery().queryKey, session)
      await navigate('/staff', { replace: true })
    },
  })
  const errors = issuesByField(start.error, words)
  return (
    <Sheet title="Staff sign-in">
      <TitleBlock
        title="Staff sign-in"
        facts={[{ name: 'Every look', value: 'is on record with its reason', full: true }]}
      >
        <p className="prose">For support staff. Accounts of customers sign in elsewhere.</p>
      </TitleBlock>
      <Band>
        <form className="max-w-[680px]" noValidate onSubmit={handleSubmit((body) => start.mutate(body))}>
          <TextField
            label="Mail address"
            type="email"
            autoComplete="username"
            error={errors['mail']}
            {...register('mail')}
          />
          <TextField
            label="Password"
            type="password"
            autoComplete="current-password"
            error={errors['password']}
            {...register('password')}
          />
          <FormFailure error={start.error} words={words} />
          <div className="btnrow mt-5">
            <SendButton kind="main" type="submit" error={start.error} disabled={start.isPending}>
              {start.isPending ? 'Signing in' : 'Sign in'}
            </SendButton>
          </div>
        </form>
      </Band>
    </Sheet>
  )
}
