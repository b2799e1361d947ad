import * as z from 'zod';
import { narrowingParameters } from '@/app/api/_http/parameters';
import { FORMATS } from '@/lib/export/format';

export const stationParameters = { format: z.enum(FORMATS).default('geojson'), ...narrowingParameters };
