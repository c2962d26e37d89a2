import { Outlet, redirect, type LoaderFunctionArgs } from 'react-router-dom';
import { accountQuery } from '../../features/account/api/get-account.js';
import { ApiProblem } from '../../lib/api-problem.js';
import { queryClient } from '../../lib/query-client.js';
import { paths } from '../paths.js';

/** Sends whoever is not signed in to the sign-in page, which leads back here. */
export async function loader({ request }: LoaderFunctionArgs): Promise<Response | null> {
  try {
    await queryClient.ensureQueryData(accountQuery());
    return null;
  } catch (error) {
    if (!(error instanceof ApiProblem) || error.status !== 401) throw error;
    const { pathname, search } = new URL(request.url);
    return redirect(paths.signIn(`${pathname}${search}`));
  }
}

export function Component() {
  return <Outlet />;
}
