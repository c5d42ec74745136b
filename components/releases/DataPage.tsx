import { useQuery } from '@tanstack/react-query';

import { QueryView } from '@/components/QueryView';
import {
  Heading,
  Link,
  LoadingState,
  Page,
  PageHead,
  Quiet,
  SkeletonRows,
  Stack,
  Text,
} from '@/components/ui';
import { releaseListQuery } from '@/lib/client/releases';

import { ReleaseCard } from './ReleaseCard';

/** Releases to download, and how to repeat their fit. */
export function DataPage() {
  const query = useQuery(releaseListQuery());
  return (
    <Page>
      <PageHead
        title="Data"
        sub="The pool as numbered releases: the anonymised checks, what their columns mean, and the fit, to download and to repeat."
        actions={<Link href="/data/privacy">What is kept private, and how</Link>}
      />
      <Stack gap="xl">
        <QueryView
          query={query}
          loading={
            <LoadingState label="Loading the releases">
              <SkeletonRows count={8} height={40} />
            </LoadingState>
          }
        >
          {({ releases }) =>
            releases.length === 0 ? (
              <Quiet>No release has been made yet.</Quiet>
            ) : (
              <Stack gap="xl">
                {releases.map((release) => (
                  <ReleaseCard key={release.number} release={release} />
                ))}
              </Stack>
            )
          }
        </QueryView>
        <Stack gap="s">
          <Heading>To repeat the fit</Heading>
          <Text>
            Download checks.csv and run, with the program: npm run -s fit -- checks.csv --json again.json. The
            file again.json is the release’s fit.json, to the last character; on another machine the last
            digits of sums may differ. Every column stands in dictionary.md, and SHA256SUMS tells whether a
            file arrived whole.
          </Text>
          <Text>
            The data are licensed under CC BY 4.0: use them for anything, and say where they are from.
          </Text>
        </Stack>
        <Stack gap="s">
          <Heading>For programs</Heading>
          <Text>
            The same as JSON, and rows as CSV too, below /api/v1: read-only, from any origin, 600 requests in
            15 minutes. Try /api/v1/cells?limit=5, /api/v1/cells/skerry-240?band=depth:deep,
            /api/v1/checks?limit=2, /api/v1/fit and /api/v1/releases. Pages go on where the answer’s “next”
            says.
          </Text>
          <Link href="/api/v1/openapi.json" download="ebbline-openapi.json">
            Its description (OpenAPI 3.1)
          </Link>
        </Stack>
      </Stack>
    </Page>
  );
}
