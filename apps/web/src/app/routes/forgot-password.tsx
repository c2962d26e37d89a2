import { chakra } from '@chakra-ui/react';
import { Link } from 'react-router-dom';
import { ForgotPasswordForm } from '../../features/auth/components/forgot-password-form.js';
import { BarePage } from '../layouts/bare-page.js';
import { paths } from '../paths.js';

const RouterLink = chakra(Link);

export function Component() {
  return (
    <BarePage
      title="Forgot the password"
      foot={
        <RouterLink to={paths.signIn()} color="act">
          Back to signing in
        </RouterLink>
      }
    >
      <ForgotPasswordForm />
    </BarePage>
  );
}
