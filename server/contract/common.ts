import * as z from 'zod';

/** An opaque, sortable identifier (UUID v7 in its usual text form). */
export const Id = z.string().min(1).max(64);

/** An instant in UTC, ISO 8601 with milliseconds. */
export const Instant = z.iso.datetime({ offset: true });

/** A span or an offset on a clip's clock, whole milliseconds, never negative. */
export const Ms = z.number().int().min(0);

export const ROLES = ['member', 'coach', 'owner'] as const;
export const Role = z.enum(ROLES);
export type Role = z.infer<typeof Role>;

export const VIEWS = ['front', 'side'] as const;
export const View = z.enum(VIEWS);
export type View = z.infer<typeof View>;

/** Trimmed text of 1 to `max` characters. */
export const text = (max: number) =>
  z
    .string()
    .trim()
    .min(1, 'Please fill this in.')
    .max(max, `Please keep this under ${max + 1} characters.`);

/** Trimmed text that may be left empty; an empty string is stored as nothing. */
export const optionalText = (max: number) =>
  z
    .string()
    .trim()
    .max(max, `Please keep this under ${max + 1} characters.`)
    .transform((value) => (value === '' ? null : value))
    .nullish();

export const Person = z.object({ id: Id, name: z.string() });
export type Person = z.infer<typeof Person>;

/** RFC 9457 problem details, as every error of the API is told. */
export const Problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number().int(),
  detail: z.string(),
  errors: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
});
export type Problem = z.infer<typeof Problem>;

/** Keyset paging as query parameters. */
export const PageQuery = z.object({
  limit: z.coerce.number().int().min(1).max(100).default(50),
  cursor: z.string().max(400).optional(),
});
export type PageQuery = z.infer<typeof PageQuery>;

/** One page of a list; `next` is null at the end. */
export const pageOf = <T extends z.ZodType>(item: T) =>
  z.object({ items: z.array(item), next: z.string().nullable() });

/** A page as a plain type. */
export interface Page<T> {
  items: T[];
  next: string | null;
}

/** A frame rate as an exact ratio, for instance 30000/1001. */
export const Rational = z.object({ num: z.number().int().positive(), den: z.number().int().positive() });
export type Rational = z.infer<typeof Rational>;

/** A point on the displayed (upright) frame as fractions of its width and height, origin top left. */
export const Point = z.tuple([z.number().min(0).max(1), z.number().min(0).max(1)]);
export type Point = z.infer<typeof Point>;
