import { useLocalSearchParams } from 'expo-router';

import { SignInPage } from '@/components/account/SignInPage';

export default function SignInRoute() {
  const { next } = useLocalSearchParams<{ next?: string }>();
  return <SignInPage next={next} />;
}
