import { useForm } from 'react-hook-form'
import { Link } from 'react-router-dom'
import { issuesByField } from '../../api/api-error.ts'
import { SendButton } from '../../components/send-button.tsx'
import { Band, Sheet } from '../../components/sheet.tsx'
import { TextField } from '../../components/text-field.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { FormFailure } from '../../components/form-failure.tsx'
import { type SignUp, signUp } from './queries.ts'
import { useStartSession } from './use-start-session.ts'

const facts = [
  { name: 'Trial', value: '100\u202f000 points a day', full: true },
  { name: 'Card', value: 'none' },
  { name: 'Least charge', value: '10 points a call' },
]

const words = { labels: { name: 'Your name', accountName: 'Account name', mail: 'Mail address', password: 'Password' } }

export function SignUpScreen() {
  const { register, handleSubmit } = useForm<SignUp>()
  const start = useStartSession(signUp, '/keys')
  const errors = issuesByField(start.error, words)
  return (
    <Sheet title="Sign up">
      <TitleBlock title="Sign up" facts={facts}>
        <p className="prose">An account holds your keys and shows what they do. The next step is a trial key.</p>
      </TitleBlock>
      <Band>
        <form className="max-w-[680px]" noValidate onSubmit={handleSubmit((body) => start.mutate(body))}>
          <TextField label="Your name" autoComplete="name" error={errors['name']} {...register('name')} />
          <TextField
            label="Account name"
            hint="your firm or project"
            autoComplete="organization"
            error={errors['accountName']}
            {...register('accountName')}
          />
          <TextField
            label="Mail address"
            type="email"
            autoComplete="email"
            error={errors['mail']}
            {...register('mail')}
          />
          <TextField
            label="Password"
            hint="at least 15 characters, of any kind"
            type="password"
            autoComplete="new-password"
            error={errors['password']}
            {...register('password')}
          />
          <FormFailure error={start.error} words={words} />
          <div className="btnrow mt-5">
            <SendButton kind="main" type="submit" error={start.error} disabled={start.isPending}>
              {start.isPending ? 'Signing up' : 'Sign up'}
            </SendButton>
            <span>
              Have an account? <Link to="/sign-in">Sign in</Link>
            </span>
          </div>
        </form>
      </Band>
    </Sheet>
  )
}
