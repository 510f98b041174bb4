import * as z from 'zod';

/** One field's complaint; `path` is dotted, e.g. `contents.0.massG`, empty for the whole body. */
export const fieldError = z.object({ path: z.string(), message: z.string() });
export type FieldError = z.infer<typeof fieldError>;

/** RFC 9457 problem details, with our `code` and the field errors. Other members may follow. */
export const problem = z.looseObject({
  type: z.string(),
  title: z.string(),
  status: z.number().int(),
  detail: z.string().optional(),
  instance: z.string().optional(),
  code: z.string(),
  errors: z.array(fieldError),
});
export type Problem = z.infer<typeof problem>;
