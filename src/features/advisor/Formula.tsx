import { Fragment } from 'react'

/** A formula as it is written on paper: `m_f` and `w^1.5` with their small letters below and above the line. */
export function Formula({ text }: { text: string }) {
  return text.split(/([_^](?:[\p{L}\d]+(?:[.,]\d+)?))/u).map((part, index) => {
    if (part.startsWith('_')) return <sub key={index}>{part.slice(1)}</sub>
    if (part.startsWith('^')) return <sup key={index}>{part.slice(1)}</sup>
    return <Fragment key={index}>{part}</Fragment>
  })
}
