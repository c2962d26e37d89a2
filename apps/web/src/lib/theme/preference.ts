import { useSyncExternalStore } from 'react';

export const themePreferences = ['light', 'dark', 'system'] as const;
export type ThemePreference = (typeof themePreferences)[number];
export type ThemeMode = 'light' | 'dark';

const key = 'overtally.theme';
const listeners = new Set<() => void>();
const systemDark = () => window.matchMedia('(prefers-color-scheme: dark)');

/** Stored choice; `system` when none is stored or storage is closed to the page. */
export function readPreference(): ThemePreference {
  try {
    const stored = window.localStorage.getItem(key);
    return themePreferences.find((preference) => preference === stored) ?? 'system';
  } catch {
    return 'system';
  }
}

function resolveMode(): ThemeMode {
  const preference = readPreference();
  if (preference !== 'system') return preference;
  return systemDark().matches ? 'dark' : 'light';
}

function apply(): void {
  const mode = resolveMode();
  const { classList } = document.documentElement;
  classList.toggle('dark', mode === 'dark');
  classList.toggle('light', mode === 'light');
  for (const listener of listeners) listener();
}

/** Keeps the choice in this browser and shows it at once. */
export function setPreference(preference: ThemePreference): void {
  window.localStorage.setItem(key, preference);
  apply();
}

/** Follows the system's setting and choices made in other tabs; call once at start. */
export function watchTheme(): void {
  apply();
  systemDark().addEventListener('change', apply);
  window.addEventListener('storage', apply);
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

/** The stored choice, and the setter that keeps it. */
export function useThemePreference(): [ThemePreference, (preference: ThemePreference) => void] {
  return [useSyncExternalStore(subscribe, readPreference), setPreference];
}

/** The theme now shown. */
export function useThemeMode(): ThemeMode {
  return useSyncExternalStore(subscribe, resolveMode);
}
