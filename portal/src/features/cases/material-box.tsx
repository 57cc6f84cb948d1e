import { useQuery } from '@tanstack/react-query'
import { type AriaAttributes, useState } from 'react'
import type { UseFormRegisterReturn } from 'react-hook-form'
import { plain } from '../../figure/measures.ts'
import { catalogueQuery } from './queries.ts'

interface Props {
  id: string
  access: AriaAttributes
  register: UseFormRegisterReturn
}

/** The id of a material: the catalogue is offered while it is typed, and the figures of the one that stands there shown. */
export function MaterialBox({ id, access, register }: Props) {
  const materials = useQuery(catalogueQuery()).data?.materials ?? []
  const [typed, setTyped] = useState<string>()
  const chosen = materials.find((one) => one.id === typed)
  return (
    <>
      <input
        id={id}
        className="box"
        autoComplete="off"
        list={`${id}-list`}
        {...access}
        {...register}
        ref={(box) => {
          register.ref(box)
          if (box) setTyped(box.value)
        }}
        onChange={(event) => {
          setTyped(event.target.value)
          return register.onChange(event)
        }}
      />
      <datalist id={`${id}-list`}>
        {materials.map((one) => (
          <option key={one.id} value={one.id}>
            {one.name}
          </option>
        ))}
      </datalist>
      <span role="status" className="hint">
        {chosen &&
          `${chosen.name}: k ${plain(chosen.conductivity)}, ρ ${plain(chosen.density)}, c ${plain(chosen.specificHeat)}; ${chosen.state}, confidence ${chosen.confidence}`}
      </span>
    </>
  )
}
