import { createContext, useContext, useEffect } from 'react';

/** Lets a page name itself in the top bar of the shell around it. */
export const CrumbContext = createContext<(crumb: string | null) => void>(() => undefined);

/** Shows `crumb` as the last part of the path in the top bar while the caller is on screen. */
export function useCrumb(crumb: string | null): void {
  const setCrumb = useContext(CrumbContext);
  useEffect(() => {
    setCrumb(crumb);
    return () => setCrumb(null);
  }, [crumb, setCrumb]);
}
