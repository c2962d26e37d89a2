import { chakra } from '@chakra-ui/react';
import { Link, useNavigate, useSearchParams } from 'react-router-dom';
import { accountQuery } from '../../features/account/api/get-account.js';
import { SignInForm } from '../../features/auth/components/sign-in-form.js';
import { queryClient } from '../../lib/query-client.js';
import { BarePage } from '../layouts/bare-page.js';
import { paths, safeNext } from '../paths.js';

const RouterLink = chakra(Link);

export function Component() {
  const navigate = useNavigate();
  const [search] = useSearchParams();
  return (
    <BarePage
      title="Sign in"
      foot={
        <>
          <RouterLink to={paths.forgotPassword()} color="act" textDecoration="underline">
            Forgot the password?
          </RouterLink>{' '}
          Accounts come by invitation to a project, or from an administrator.
        </>
      }
    >
      <SignInForm
        onSignedIn={(account) => {
          queryClient.clear();
          queryClient.setQueryData(accountQuery().queryKey, account);
          void navigate(safeNext(search.get('next')), { replace: true });
        }}
      />
    </BarePage>
  );
}
