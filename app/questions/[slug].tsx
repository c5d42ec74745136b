import { useLocalSearchParams } from 'expo-router';

import { QuestionPage } from '@/components/explore';

export default function QuestionRoute() {
  const { slug } = useLocalSearchParams<{ slug: string }>();
  return <QuestionPage key={slug} slug={slug} />;
}
