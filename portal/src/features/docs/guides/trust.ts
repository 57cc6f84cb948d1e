import type { Guide } from '../guide.ts'

export const trust: Guide = {
  slug: 'how-sure-an-answer-is',
  title: 'How sure an answer is',
  summary: 'What the bound covers, what it does not, and what the other parts of an answer are for.',
  parts: [
    {
      heading: 'The bound is of the arithmetic',
      text: [
        '`accuracy.bound` gives for each output an absolute and a relative part; the error of a value is at most the absolute part and the relative part times the value. It is never below the true error.',
        'It says nothing of the model or of your numbers. A film coefficient that is off by a fifth moves the answer far more than any rounding does.',
      ],
    },
    {
      heading: 'Checks',
      text: [
        'Each check compares two figures and says whether it holds: that a depth lies in the body, that a half space is deep enough, that one temperature would do. A check that does not hold tells about the model and refuses nothing.',
      ],
    },
    {
      heading: 'Warnings and cautions',
      text: [
        'A warning has a code, a text and the value it is about, and belongs to this very input. A caution belongs to the case, travels in every answer, and cannot be switched off. Show both to the reader of the number.',
      ],
    },
    {
      heading: 'Keep what makes it repeatable',
      text: [
        'Keep `input`, which holds every default and derived property as it was used, and `solver`. With these the same bytes can be had again.',
      ],
    },
  ],
  links: [{ to: '/problems', text: 'All warnings and problems' }],
}
