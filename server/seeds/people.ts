/** Invented buyers: names put together by chance, streets that do not exist, mail domains that cannot exist (.example, RFC 2606). */
import type { DeliveryAddress } from '../models/order.ts'
import type { Prng } from './prng.ts'

interface Country {
  /** share of the orders, in parts of the sum of all shares */
  share: number
  first: string[]
  last: string[]
  streets: string[]
  /** town and what its postcode looks like; # is a digit, @ a letter */
  towns: [town: string, postcode: string, region?: string][]
}

const iberianFirst = [
  'Ana',
  'Bruno',
  'Clara',
  'Dinis',
  'Elisa',
  'Filipe',
  'Graça',
  'Hugo',
  'Irene',
  'Jaime',
  'Lídia',
  'Nuno',
]
const countries: Record<string, Country> = {
  PT: {
    share: 30,
    first: iberianFirst,
    last: ['Carvalhosa', 'Tavarim', 'Moucheira', 'Pedralva', 'Salgadinho', 'Ribalonga', 'Fontelar', 'Vilarim'],
    streets: [
      'Rua do Moinho de Cima',
      'Rua das Oficinas',
      'Travessa do Aro',
      'Avenida da Ria Velha',
      'Largo dos Raios',
    ],
    towns: [
      ['Aveiro', '3800-###'],
      ['Coimbra', '3000-###'],
      ['Porto', '4000-###'],
      ['Évora', '7000-###'],
      ['Braga', '4700-###'],
      ['Faro', '8000-###'],
    ],
  },
  ES: {
    share: 15,
    first: ['Aitor', 'Begoña', 'Carmen', 'Diego', 'Elena', 'Iker', 'Lucía', 'Martín', 'Nerea', 'Óscar'],
    last: ['Alcorvés', 'Berrizar', 'Castrollano', 'Montegrís', 'Peñarrubí', 'Valdeoca', 'Zubimar'],
    streets: ['Calle del Torno', 'Calle de los Fresnos', 'Paseo del Canal Viejo', 'Calle Llanta'],
    towns: [
      ['Vigo', '362##'],
      ['Girona', '170##'],
      ['Bilbao', '480##'],
      ['Granada', '180##'],
    ],
  },
  FR: {
    share: 10,
    first: ['Adèle', 'Bastien', 'Camille', 'Denis', 'Élodie', 'Florian', 'Hélène', 'Jules'],
    last: ['Boisrenaud', 'Clairvent', 'Dufrêne', 'Lormoy', 'Pierrefond', 'Vauchel'],
    streets: ['rue des Charrons', 'chemin du Vieux Hêtre', 'allée des Rayons'],
    towns: [
      ['Annecy', '740##'],
      ['Rennes', '350##'],
      ['Lyon', '690##'],
      ['Bayonne', '641##'],
    ],
  },
  DE: {
    share: 12,
    first: ['Anke', 'Bernd', 'Carla', 'Dirk', 'Frauke', 'Gerd', 'Jule', 'Lars', 'Mirjam', 'Sönke'],
    last: ['Achsenried', 'Brunnhövel', 'Eschenlohr', 'Felgentreu', 'Lindwald', 'Radmoser'],
    streets: ['Stellmacherweg', 'Am Alten Speicher', 'Ulmenzeile', 'Nabenstraße'],
    towns: [
      ['Freiburg', '791##'],
      ['Münster', '481##'],
      ['Leipzig', '041##'],
      ['Bremen', '281##'],
    ],
  },
  IE: {
    share: 3,
    first: ['Aoife', 'Ciarán', 'Niamh', 'Padraig'],
    last: ['Kilbracken', 'Rathmoyle', 'Dunferris'],
    streets: ['Wheelwright Row', 'Ash Lane'],
    towns: [
      ['Galway', 'H91 @#@#'],
      ['Cork', 'T12 @#@#'],
    ],
  },
  NL: {
    share: 6,
    first: ['Bram', 'Femke', 'Gijs', 'Lotte', 'Sanne', 'Wout'],
    last: ['van Elzenrade', 'Iepenburg', 'de Wielmaker', 'Molenkamp'],
    streets: ['Wagenmakerspad', 'Velgstraat', 'Essenkade'],
    towns: [
      ['Utrecht', '35## @@'],
      ['Groningen', '97## @@'],
    ],
  },
  BE: {
    share: 4,
    first: ['Arne', 'Elise', 'Jonas', 'Margaux'],
    last: ['Vanderesse', 'Beukelaar', 'Charronnet'],
    streets: ['Spaakstraat', 'rue du Moyeu'],
    towns: [
      ['Gent', '90##'],
      ['Namur', '50##'],
    ],
  },
  AT: {
    share: 3,
    first: ['Lisbeth', 'Matthias', 'Romana'],
    last: ['Buchenegger', 'Radhuber', 'Lärchbaum'],
    streets: ['Wagnergasse', 'Am Erlenbach'],
    towns: [
      ['Graz', '80##'],
      ['Innsbruck', '60##'],
    ],
  },
  IT: {
    share: 6,
    first: ['Aldo', 'Bianca', 'Chiara', 'Dario', 'Marta', 'Sandro'],
    last: ['Carpinelli', 'Frassinari', 'Mozzalunga', 'Olmarini'],
    streets: ['via dei Carradori', 'via del Frassino', 'vicolo Raggi'],
    towns: [
      ['Bergamo', '241##'],
      ['Lucca', '551##'],
      ['Trento', '381##'],
    ],
  },
  LU: {
    share: 1,
    first: ['Joëlle', 'Luc'],
    last: ['Eschdorfer', 'Ulmerich'],
    streets: ['rue du Charron'],
    towns: [['Esch-sur-Alzette', 'L-4###']],
  },
  GB: {
    share: 7,
    first: ['Alison', 'Callum', 'Freya', 'Gareth', 'Imogen', 'Owen'],
    last: ['Ashcombe', 'Fellowood', 'Hornbeck', 'Rowanlea', 'Spokely'],
    streets: ['Cartwright Street', 'Alder Rise', 'Old Forge Lane'],
    towns: [
      ['Sheffield', 'S1 #@@'],
      ['Bristol', 'BS1 #@@'],
      ['Leeds', 'LS1 #@@'],
    ],
  },
  US: {
    share: 3,
    first: ['Daphne', 'Everett', 'June', 'Marcus'],
    last: ['Hollowell', 'Larchmont', 'Pinecroft'],
    streets: ['Wagon Works Road', 'Elm Fork Drive'],
    towns: [
      ['Boulder', '803##', 'CO'],
      ['Portland', '972##', 'OR'],
    ],
  },
}

export interface Buyer {
  name: string
  email: string
  market: string
  delivery: DeliveryAddress
}

const weighted = Object.entries(countries).flatMap(([code, { share }]) => Array.from({ length: share }, () => code))
const postcodeFrom = (pattern: string, random: Prng) =>
  pattern.replace(/[#@]/g, (mark) =>
    mark === '#' ? String(random.between(0, 9)) : 'ABDEFGHJLNPRSTUWXY'.charAt(random.between(0, 17)),
  )
const plain = (text: string) =>
  text
    .normalize('NFD')
    .replace(/[^\p{Letter} ]/gu, '')
    .toLowerCase()
    .replaceAll('ß', 'ss')
    .replaceAll(' ', '.')

/** One buyer; `mark` keeps addresses of equal names apart. */
export function inventBuyer(random: Prng, mark: number): Buyer {
  const market = random.pick(weighted)
  const country = countries[market]
  if (!country) throw new Error(`no country ${market}`)
  const name = `${random.pick(country.first)} ${random.pick(country.last)}`
  const [city, pattern, region] = random.pick(country.towns)
  const number = random.between(1, 140)
  const street = random.pick(country.streets)
  const line1 =
    market === 'GB' || market === 'US' || market === 'IE' || market === 'FR'
      ? `${number} ${street}`
      : `${street} ${number}`
  const email = `${plain(name)}${mark}@${random.pick(['mail.example', 'post.example', 'inbox.example'])}`
  const delivery: DeliveryAddress = { name, line1, postcode: postcodeFrom(pattern, random), city, country: market }
  if (random.chance(0.15))
    delivery.line2 = market === 'PT' ? `${random.between(1, 6)}.º esq.` : `Flat ${random.between(1, 30)}`
  if (region) delivery.region = region
  return { name, email, market, delivery }
}
