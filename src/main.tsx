import { StrictMode } from 'react'
import { createRoot } from 'react-dom/client'
import './app.css'
import { Providers } from './app/Providers.tsx'
import { startTexts } from './lib/i18n.ts'
import { readPreferences } from './lib/preferences.tsx'

const root = document.getElementById('root')
if (!root) throw new Error('index.html has lost its root element')
const preferences = readPreferences()
await startTexts(preferences.language)
createRoot(root).render(
  <StrictMode>
    <Providers preferences={preferences} />
  </StrictMode>,
)
