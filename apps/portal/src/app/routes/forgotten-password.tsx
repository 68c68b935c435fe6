import { ForgottenPassword } from '../../features/accounts/components/forgotten-password.tsx';

export function Component() {
  return <ForgottenPassword />;
}
