import { useThemePreference, type ThemePreference } from '../lib/theme/preference.js';
import { Segmented } from './segmented.js';

const options: readonly { value: ThemePreference; label: string }[] = [
  { value: 'light', label: 'Light' },
  { value: 'dark', label: 'Dark' },
  { value: 'system', label: 'As the system' },
];

/** Choice of theme, kept in this browser. */
export function ThemeChoice() {
  const [preference, setPreference] = useThemePreference();
  return <Segmented label="Theme" value={preference} options={options} onChange={setPreference} />;
}
