import { z } from 'zod';
import type { RequestName, Requests } from '../contract/requests';

const nothing = z.undefined();
const studyText = z.strictObject({ text: z.string() });
const millimetres = z.number().min(40).max(500).optional();
const report = z.strictObject({
  results: z.array(z.strictObject({ name: z.string(), text: z.string() })).min(1),
  part: z.enum([
    'html',
    'pdf',
    'markdown',
    'latex',
    'figureSvg',
    'figurePdf',
    'figurePng',
    'pointsCsv',
    'pointsJson',
    'tableCsv',
  ]),
  options: z
    .strictObject({
      widthMillimetres: millimetres,
      heightMillimetres: millimetres,
      hasCaption: z.boolean().optional(),
    })
    .optional(),
});
const calculation = z.strictObject({ id: z.int() });

/** What each request must carry. What comes from the window is `unknown` until it has passed here. */
export const PAYLOADS = {
  'program:describe': nothing,
  'samples:list': nothing,
  'samples:open': z.strictObject({ id: z.string() }),
  'basis:list': nothing,
  'basis:show': z.strictObject({ name: z.string() }),
  'study:check': studyText,
  'calculation:start': studyText,
  'report:make': report,
  'calculation:cancel': calculation,
} satisfies {
  readonly [C in RequestName]: z.ZodType<Parameters<Requests[C]>[0]>;
};

export function isRequestName(name: unknown): name is RequestName {
  return typeof name === 'string' && Object.hasOwn(PAYLOADS, name);
}
