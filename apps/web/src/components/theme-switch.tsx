import { chakra, IconButton } from '@chakra-ui/react';
import { setPreference, useThemeMode } from '../lib/theme/preference.js';

/** Turns the page: light ground or dark ground. The choice "as the system" stands on the account page. */
export function ThemeSwitch() {
  const other = useThemeMode() === 'dark' ? 'light' : 'dark';
  return (
    <IconButton
      variant="ghost"
      colorPalette="gray"
      aria-label={`Change to the ${other} theme`}
      title={`Change to the ${other} theme`}
      onClick={() => setPreference(other)}
    >
      <chakra.svg viewBox="0 0 16 16" fill="none" stroke="currentColor" strokeWidth="1.4" aria-hidden="true">
        <circle cx="8" cy="8" r="6" />
        <path d="M8 2a6 6 0 0 1 0 12z" fill="currentColor" />
      </chakra.svg>
    </IconButton>
  );
}
