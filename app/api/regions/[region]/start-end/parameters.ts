import { waitParameter } from '@/app/api/_http/long-answer';
import { plainFormatParameter } from '@/app/api/_http/plain-table';

export const startEndParameters = { ...plainFormatParameter, ...waitParameter };
