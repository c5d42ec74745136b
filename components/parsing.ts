import { z } from 'zod';

// Else each schema tries out compiled parsers as it is defined, which our content security policy forbids and reports.
// Comes before everything that defines one.
z.config({ jitless: true });
