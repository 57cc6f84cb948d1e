import 'swagger-ui-react/swagger-ui.css'
import './explorer.css'
import { useQuery } from '@tanstack/react-query'
import { useId, useMemo } from 'react'
import { useSearchParams } from 'react-router-dom'
import SwaggerUI from 'swagger-ui-react'
import { unwrap } from '../../api/api-error.ts'
import { publicApi } from '../../api/clients.ts'
import { QueryView } from '../../components/query-view.tsx'
import { keyPlugin } from './key-plugin.tsx'
import { type Contract, casesIn, partOf } from './part-of.ts'

const plugins = [keyPlugin]

/** The operations of the contract to try: those that belong to no case, and those of one case. */
export default function Explorer() {
  const query = useQuery({
    queryKey: ['contract'],
    queryFn: ({ signal }) => unwrap(publicApi.GET('/v1/openapi.json', { signal })) as Promise<unknown>,
    staleTime: Infinity,
  })
  return (
    <QueryView query={query} what="Reading the contract.">
      {(contract) => <Explored contract={contract as Contract} />}
    </QueryView>
  )
}

function Explored({ contract }: { contract: Contract }) {
  const id = useId()
  const [search, setSearch] = useSearchParams()
  const cases = useMemo(() => casesIn(contract), [contract])
  const asked = search.get('case') ?? ''
  const chosen = cases.includes(asked) ? asked : (cases[0] ?? '')
  const spec = useMemo(() => partOf(contract, chosen), [contract, chosen])
  return (
    <>
      <p className="btnrow mb-4">
        <label htmlFor={id} className="font-[560]">
          Questions of the case
        </label>
        <select
          id={id}
          className="box max-w-[320px]"
          value={chosen}
          onChange={(event) => setSearch({ case: event.target.value }, { replace: true })}
        >
          {cases.map((one) => (
            <option key={one}>{one}</option>
          ))}
        </select>
      </p>
      <div className="explorer">
        <SwaggerUI
          spec={spec}
          plugins={plugins}
          docExpansion="list"
          defaultModelsExpandDepth={-1}
          persistAuthorization={false}
        />
      </div>
    </>
  )
}
