import { ButtonLink, Page, PageHead, Text } from '@/components/ui';

export default function NotFound() {
  return (
    <Page narrow>
      <PageHead title="No such page" sub="The address leads nowhere here." />
      <Text>It may have been mistyped, or what it led to may have been taken out since.</Text>
      <ButtonLink href="/" label="To measured lifetimes" kind="primary" />
    </Page>
  );
}
