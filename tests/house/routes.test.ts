import { readdirSync, readFileSync } from 'node:fs';
import { join, relative } from 'node:path';

const root = join(__dirname, '../..');
const mostLines = 60;

const routes = readdirSync(join(root, 'app'), { recursive: true, withFileTypes: true })
  .filter((entry) => entry.isFile())
  .map((entry) => relative(root, join(entry.parentPath, entry.name)));

it.each(routes)('%s is a route and no more', (route) => {
  const text = readFileSync(join(root, route), 'utf8');
  expect(text.split('\n').length - 1).toBeLessThan(mostLines);
  expect(text).toMatch(/^export default /m);
});
