/** One language at a time: each is a chunk of its own, loaded when chosen. */
import i18next from 'i18next'
import { initReactI18next } from 'react-i18next'
import type { Locale } from '#contract/common.ts'

type Texts = Record<string, Record<string, unknown>>

const loaders: Record<Locale, () => Promise<{ texts: Texts }>> = {
  en: () => import('../../locales/en.ts'),
  pt: () => import('../../locales/pt.ts'),
}

export const languageNames: Record<Locale, string> = { en: 'English', pt: 'Português' }

export async function startTexts(language: Locale) {
  await i18next.use(initReactI18next).init({
    lng: language,
    fallbackLng: false,
    defaultNS: 'common',
    interpolation: { escapeValue: false },
    resources: {},
    partialBundledLanguages: true,
    returnNull: false,
  })
  await changeLanguage(language)
}

export async function changeLanguage(language: Locale) {
  const { texts } = await loaders[language]()
  for (const [feature, words] of Object.entries(texts)) i18next.addResourceBundle(language, feature, words, true, true)
  await i18next.changeLanguage(language)
  document.documentElement.lang = language
}
