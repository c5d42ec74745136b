import { z } from 'zod';

import { idSchema } from '@/lib/contract/fields';

export const bankParamsSchema = z.object({ bankId: idSchema });
export const uploadParamsSchema = z.object({ uploadId: idSchema });
export const photoParamsSchema = z.object({ photoId: idSchema });
