import { z } from 'zod'
import { initialTemperature, MAX_POSITIONS } from './fields.ts'
import { quantities } from './quantity.ts'

/* A start that is not uniform (initial-profile.ts) as it is stated. */

const points = { max: 1e5, min: 0, unit: 'm' }

const profileField = z
  .strictObject({
    depths: quantities(
      { ...points, symbol: 'x', label: 'Depths of the profile', hint: 'from 0 to the thickness' },
      MAX_POSITIONS,
    ),
    temperatures: quantities(
      {
        unit: 'Cel',
        min: -273.15,
        max: 1e4,
        typical: [-40, 100],
        symbol: 'T',
        label: 'Temperatures of the profile',
        hint: 'one for each depth',
      },
      MAX_POSITIONS,
    ),
  })
  .meta({
    title: 'Initial profile',
    description:
      'Initial profile: depths and temperatures at time 0, linear between; from 0 to the thickness, a jump as the same depth twice. In place of initialTemperature.',
    'x-accepted': 'depths and temperatures of equal count, from depth 0 to the thickness, a depth at most twice',
    'x-hint': 'a start that is not uniform, as after a change of film',
  })

/** For a case that always starts from a profile. */
export const initialProfile = profileField

/** For a case that starts from one temperature or from a profile. */
export const start = {
  initialTemperature: initialTemperature.optional(),
  initialProfile: profileField.optional(),
}
