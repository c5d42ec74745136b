import { useLocalSearchParams } from 'expo-router';

import { RequestResetPage, ResetPasswordPage } from '@/components/members';

/** Without a token: asks for the mail that brings one. */
export default function ResetRoute() {
  const { token, email } = useLocalSearchParams<{ token?: string; email?: string }>();
  return token ? <ResetPasswordPage key={token} token={token} /> : <RequestResetPage email={email} />;
}
