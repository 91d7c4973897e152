import { Choice } from '../ui/Choice.tsx'
import { setPreferences, usePreferences } from './preferences.ts'

export function UnitChoice() {
  const unit = usePreferences((state) => state.unit)
  return (
    <Choice
      legend="Unit shown"
      value={unit}
      options={[
        { value: 'mm', label: 'mm' },
        { value: 'in', label: 'inch' },
      ]}
      onChange={(next) => setPreferences({ unit: next })}
    />
  )
}

export function ThemeChoice() {
  const theme = usePreferences((state) => state.theme)
  return (
    <Choice
      legend="Theme"
      value={theme}
      options={[
        { value: 'paper', label: 'paper' },
        { value: 'tank', label: 'tank' },
        { value: 'system', label: 'system' },
      ]}
      onChange={(next) => setPreferences({ theme: next })}
    />
  )
}
