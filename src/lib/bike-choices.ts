/** The facts of a bike that a wheel has to match, as the forms offer them. The codes are the ones hubs list in the catalogue. */
export const bikeChoices = {
  frontAxle: ['qr-9x100', '12x100', '15x100', '15x110'],
  rearAxle: ['qr-10x130', 'qr-10x135', '12x142', '12x148'],
  freehub: ['spline-road', 'spline-short', 'thread-mountain', 'thread-road', 'fine-spline', 'pattern-i'],
  rotorMount: ['centre-lock', 'six-bolt'],
} as const
