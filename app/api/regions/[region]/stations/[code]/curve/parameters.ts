import { formatParameter } from '@/app/api/_http/table';
import { curveParameters } from '../../../curves/parameters';

export const stationCurveParameters = { ...formatParameter, kind: curveParameters.kind };
