import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { Band, Sheet } from '../../components/sheet.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { useSettled } from '../../solving/use-settled.ts'
import { isFull } from '../../solving/solve.ts'
import { Claims } from './claims.tsx'
import { FirstAnswer } from './first-answer.tsx'
import { Hero } from './hero.tsx'
import { Readers } from './readers.tsx'
import { answerQuery, fieldQuery, filmAt } from './wall.ts'

export function HomeScreen() {
  const [position, setPosition] = useState(68)
  const [hours, setHours] = useState(24)
  const film = filmAt(position)
  const asked = useSettled(`${film} ${hours}`).split(' ').map(Number) as [number, number]
  const field = useQuery(fieldQuery(asked[0]))
  const answer = useQuery(answerQuery(...asked))
  const shown = answer.data && isFull(answer.data) ? answer.data : undefined
  return (
    <Sheet title="Home">
      <TitleBlock
        large
        title="How temperature moves through a body, and how sure we are"
        facts={[
          { name: 'Error of a temperature', value: '≤ 10⁻¹² of the driving difference', full: true },
          { name: 'Charged by', value: 'evaluated point' },
          { name: 'Refused call', value: '0 points' },
          { name: 'Solver', value: shown?.solver ?? (answer.isError ? '–' : 'reading') },
          { name: 'Trial', value: '100\u202f000 points a day' },
          { name: 'Address', value: `${location.origin}/v1`, full: true },
        ]}
      >
        <p className="lead">
          Soakstone is a web API. Your software sends a body, a boundary and some times; it answers with temperatures,
          heat flows and an upper limit on their error.
        </p>
      </TitleBlock>
      <Band label="A brick wall meets the cold">
        <Hero
          field={field}
          answer={answer}
          film={film}
          hours={hours}
          position={position}
          asked={asked}
          onPosition={setPosition}
          onHours={setHours}
        />
      </Band>
      <Claims />
      <Readers answer={shown} />
      <FirstAnswer film={asked[0]} hours={asked[1]} />
    </Sheet>
  )
}
