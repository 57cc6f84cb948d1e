import { useForm } from 'react-hook-form'
import { Link, useSearchParams } from 'react-router-dom'
import { issuesByField } from '../../api/api-error.ts'
import { SendButton } from '../../components/send-button.tsx'
import { Band, Sheet } from '../../components/sheet.tsx'
import { TextField } from '../../components/text-field.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { FormFailure } from '../../components/form-failure.tsx'
import { type SignIn, signIn } from './queries.ts'
import { nextOf, useStartSession } from './use-start-session.ts'

const words = { labels: { mail: 'Mail address', password: 'Password' } }

export function SignInScreen() {
  const [search] = useSearchParams()
  const { register, handleSubmit } = useForm<SignIn>()
  const start = useStartSession(signIn, nextOf(search))
  const errors = issuesByField(start.error, words)
  return (
    <Sheet title="Sign in">
      <TitleBlock title="Sign in" facts={[{ name: 'A session lasts', value: '12 hours', full: true }]}>
        <p className="prose">To your keys, usage and requests.</p>
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
            <span>
              No account yet? <Link to="/sign-up">Sign up</Link>
            </span>
          </div>
        </form>
      </Band>
    </Sheet>
  )
}
