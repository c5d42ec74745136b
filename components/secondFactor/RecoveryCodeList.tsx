import { Banner, Button, Figure, Row, Stack, Text } from '@/components/ui';
import { keepFile } from '@/lib/client/http';

const fileOf = (codes: readonly string[]) =>
  new Blob(
    [
      `Recovery codes of an account at Ebbline.\nEach signs in once, after the password.\n\n${codes.join('\n')}\n`,
    ],
    { type: 'text/plain' },
  );

/** The ten codes, while they can be read. */
export function RecoveryCodeList({ codes }: { codes: readonly string[] }) {
  return (
    <Stack gap="l">
      <Banner kind="caution" title="These are shown this once">
        Keep them where you find them without your phone: on paper, or in a password manager.
      </Banner>
      <Text>
        Each signs you in once, in place of a code of the app. Whoever has one and your password has your
        account.
      </Text>
      <ul className="ebb-codes" aria-label="Recovery codes">
        {codes.map((code) => (
          <li key={code}>
            <Figure>{code}</Figure>
          </li>
        ))}
      </ul>
      <Row>
        <Button
          label="Save as a file"
          onPress={() => keepFile(fileOf(codes), 'ebbline-recovery-codes.txt')}
        />
      </Row>
    </Stack>
  );
}
