/** What can be chosen on a wheelset: axles, gear body, rotor mount. */
import type { Wheelset } from '#contract/catalogue.ts'

export const optionNames = ['frontAxle', 'rearAxle', 'freehub', 'rotorMount'] as const
export type OptionName = (typeof optionNames)[number]
export type Options = Record<OptionName, string | null>

export const offered = ({ front, rear }: Wheelset): Record<OptionName, string[]> => ({
  frontAxle: front.axles,
  rearAxle: rear.axles,
  freehub: rear.freehubs,
  // The hub has one mount; it is shown, and sent along so that the order says it.
  rotorMount: rear.rotorMount === null ? [] : [rear.rotorMount],
})

/** What is certain before anybody chooses: the only one offered, or the rider's own bike from the fitting. */
export function firstOptions(set: Wheelset, known: Partial<Record<OptionName, string | null | undefined>>): Options {
  const choices = offered(set)
  const first = (name: OptionName) => {
    const list = choices[name]
    if (list.length === 1) return list[0] ?? null
    const own = known[name]
    return own !== undefined && own !== null && list.includes(own) ? own : null
  }
  return {
    frontAxle: first('frontAxle'),
    rearAxle: first('rearAxle'),
    freehub: first('freehub'),
    rotorMount: first('rotorMount'),
  }
}

export const openOptions = (set: Wheelset, options: Options): OptionName[] => {
  const choices = offered(set)
  return optionNames.filter((name) => choices[name].length > 0 && options[name] === null)
}
