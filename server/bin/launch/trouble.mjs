/** A reason not to go on that the person at the keyboard can do something about: one clear sentence with the way out. */
export class Trouble extends Error {}

/** The last lines of a log, for the case that somebody has to read them. */
export const tail = (text, lines = 12) => text.trimEnd().split('\n').slice(-lines).join('\n')

export const pause = (ms) => new Promise((resolve) => setTimeout(resolve, ms))
