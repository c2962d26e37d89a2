import { dark, light, type Palette } from './palette.js';
import { useThemeMode } from './preference.js';

/** Colours of the theme now shown, for what cannot use tokens (charts). */
export function usePalette(): Palette {
  return useThemeMode() === 'dark' ? dark : light;
}
