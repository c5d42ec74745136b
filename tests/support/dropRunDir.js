const { rmSync } = require('node:fs');

module.exports = () => rmSync(process.env.EBBLINE_TEST_RUN_DIR, { recursive: true, force: true });
