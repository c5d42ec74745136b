const { mkdtempSync } = require('node:fs');
const { tmpdir } = require('node:os');
const { join } = require('node:path');

/** A folder that the files of one run share. */
module.exports = () => {
  process.env.EBBLINE_TEST_RUN_DIR = mkdtempSync(join(tmpdir(), 'ebbline-run-'));
};
