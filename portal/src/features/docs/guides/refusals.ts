import type { Guide } from '../guide.ts'

export const refusals: Guide = {
  slug: 'refusals',
  title: 'Refusals, and what to send again',
  summary: 'Every refusal has a code that a program can match, and costs nothing.',
  parts: [
    {
      heading: 'The form',
      text: [
        'Refusals are problem details as of RFC 9457, `application/problem+json`. Match on `code`; `title` and `detail` are for people and may be reworded.',
        'An `invalid-input` holds `errors`, one entry for each field: `pointer` names it, `code` says what is wrong, `accepted` what would do. All faults of a body are told at once.',
      ],
    },
    {
      heading: 'What to send again',
      text: [
        '`retryable` says whether the very same call may succeed later. Where a `Retry-After` header comes with it, wait that many seconds. What is not retryable is refused again until it is changed.',
        'Nothing is charged for a call that is refused or fails.',
      ],
    },
    {
      heading: 'Ask us',
      text: [
        '`requestId` is the id of the call. It finds it under Requests, and support finds it by it. We keep no bodies and no keys.',
      ],
    },
  ],
  links: [{ to: '/problems', text: 'Every code, with its page' }],
}
