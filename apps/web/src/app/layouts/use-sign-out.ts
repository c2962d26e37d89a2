import { useNavigate } from 'react-router-dom';
import { notifyProblem } from '../../components/notify.js';
import { signOut } from '../../features/auth/api/sign-out.js';
import { queryClient } from '../../lib/query-client.js';
import { paths } from '../paths.js';

/** Ends the session, forgets what was shown, and leads to the sign-in page. */
export function useSignOut(): () => void {
  const navigate = useNavigate();
  return () => {
    signOut().then(
      async () => {
        await navigate(paths.signIn());
        queryClient.clear();
      },
      (error: unknown) => notifyProblem('Not signed out', error),
    );
  };
}
