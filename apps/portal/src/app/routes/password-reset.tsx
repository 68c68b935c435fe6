import { Link, useParams } from 'react-router-dom';
import { TokenPage } from '../../features/accounts/components/token-page.tsx';
import { paths } from '../../lib/paths.ts';

export function Component() {
  const { token = '' } = useParams();
  return (
    <TokenPage
      token={token}
      title="Set a new password"
      lead={(_name, email) => `For ${email}. You will be signed out everywhere else.`}
      submitLabel="Set the password"
      spent={
        <>
          It works once and for an hour. <Link to={paths.forgotten}>Ask for another one</Link>.
        </>
      }
    />
  );
}
