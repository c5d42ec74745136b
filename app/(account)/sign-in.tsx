import { useLocalSearchParams } from 'expo-router';

import { SignInPage } from '@/components/members';

export default function SignInRoute() {
  const { next } = useLocalSearchParams<{ next?: string }>();
  return <SignInPage next={next} />;
}
