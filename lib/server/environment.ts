import { z } from 'zod';

/** What the server needs from its surroundings. `npm start` sets all of it; DEVELOPERS.md says what each is for. */
const schema = z.object({
  APP_URL: z.url(),
  DATABASE_URL: z.string().min(1),
  NEXTAUTH_SECRET: z.string().min(16),
  S3_ENDPOINT: z.url(),
  S3_REGION: z.string().min(1),
  S3_BUCKET: z.string().min(1),
  S3_ACCESS_KEY: z.string().min(1),
  S3_SECRET_KEY: z.string().min(1),
  SMTP_URL: z.string().min(1),
  MAIL_FROM: z.string().min(3),
});
export type Environment = z.infer<typeof schema>;

let parsed: Environment | null = null;

/**
 * The environment, parsed once, on first use.
 * @throws Error naming every key that is missing or cannot be read
 */
export function environment(): Environment {
  if (parsed) return parsed;
  const result = schema.safeParse(process.env);
  if (!result.success) {
    const keys = result.error.issues.map((issue) => issue.path.join('.')).join(', ');
    throw new Error(
      `The environment lacks or garbles: ${keys}. "npm start" sets them; elsewhere set them by hand.`,
    );
  }
  parsed = result.data;
  return parsed;
}
