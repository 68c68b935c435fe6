import { useParams } from 'react-router-dom';
import { TokenPage } from '../../features/accounts/components/token-page.tsx';

export function Component() {
  const { token = '' } = useParams();
  return (
    <TokenPage
      token={token}
      title="Accept the invitation"
      lead={(name, email, organisation) =>
        `${name}, you were invited to ${organisation}. You will sign in as ${email}; choose a password for it.`
      }
      submitLabel="Accept and set the password"
      spent="An invitation works once and for seven days. Ask the person who invited you to send another one."
    />
  );
}
