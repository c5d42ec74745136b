import { useLocalSearchParams } from 'expo-router';

import { RequestResetPage } from '@/components/account/RequestResetPage';
import { ResetPasswordPage } from '@/components/account/ResetPasswordPage';

/** Without a token: asks for the mail that brings one. */
export default function ResetRoute() {
  const { token, email } = useLocalSearchParams<{ token?: string; email?: string }>();
  return token ? <ResetPasswordPage key={token} token={token} /> : <RequestResetPage email={email} />;
}
