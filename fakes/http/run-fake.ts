import * as z from 'zod';

/** A reason not to start that a person can act on; printed as one sentence. */
export class CannotStart extends Error {}

/** Settings out of the environment. @throws CannotStart naming each variable at fault */
export function readSettings<T extends z.ZodType>(schema: T, environment: NodeJS.ProcessEnv): z.infer<T> {
  const parsed = schema.safeParse(environment);
  if (parsed.success) return parsed.data;
  const sentences = parsed.error.issues.map(({ path, message }) => `${path.join('.')}: ${message}`);
  throw new CannotStart(`Please correct the environment: ${sentences.join('; ')}.`);
}

export const portSetting = z.coerce.number().int().min(0).max(65_535);

/** Runs a fake's process: starts it, and ends it cleanly on SIGTERM or SIGINT. */
export async function runFake(name: string, start: () => Promise<() => Promise<void>>): Promise<void> {
  try {
    const stop = await start();
    let isStopping = false;
    const end = () => {
      if (isStopping) return;
      isStopping = true;
      stop().then(
        () => process.exit(0),
        (error: unknown) => {
          console.error(error);
          process.exit(1);
        },
      );
    };
    process.once('SIGTERM', end);
    process.once('SIGINT', end);
  } catch (error) {
    const portInUse = error instanceof Error && 'code' in error && error.code === 'EADDRINUSE';
    if (portInUse)
      console.error(`${name}: its port is in use. Stop what uses it or set another one (${error.message}).`);
    else console.error(error instanceof CannotStart ? `${name}: ${error.message}` : error);
    process.exitCode = 1;
  }
}
