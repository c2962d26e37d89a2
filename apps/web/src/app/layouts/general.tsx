import { Outlet } from 'react-router-dom';
import { GeneralFrame } from './general-frame.js';
import { RouteProblem } from './route-problem.js';

export function Component() {
  return (
    <GeneralFrame>
      <Outlet />
    </GeneralFrame>
  );
}

/** A page that fails leaves the frame standing. */
export function ErrorBoundary() {
  return (
    <GeneralFrame>
      <RouteProblem />
    </GeneralFrame>
  );
}
