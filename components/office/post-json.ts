import { errorCodes, type ErrorCode, type FieldProblem } from '@/lib/inspection/app-error';

/** What came of a request: the answer, or what happened, what was kept and what to do. */
export type Posted =
  | { ok: true; status: number; data: unknown }
  | {
      ok: false;
      status: number;
      code: ErrorCode | 'offline' | 'strange';
      sentence: string;
      fields: FieldProblem[];
      detail: unknown;
      incident: string | null;
    };

const failed = (code: 'offline' | 'strange', status: number, sentence: string): Posted => ({
  ok: false,
  status,
  code,
  sentence,
  fields: [],
  detail: null,
  incident: null,
});

const isRecord = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

const fieldsOf = (value: unknown): FieldProblem[] =>
  Array.isArray(value)
    ? value.flatMap((field: unknown) =>
        isRecord(field) && typeof field.path === 'string' && typeof field.message === 'string'
          ? [{ path: field.path, message: field.message }]
          : [],
      )
    : [];

/** Asks a route of this program and reads its answer; never throws. */
export async function askJson(method: 'GET' | 'POST', path: string, body?: unknown): Promise<Posted> {
  let response: Response;
  try {
    response = await fetch(path, {
      method,
      headers:
        body === undefined
          ? { accept: 'application/json' }
          : { accept: 'application/json', 'content-type': 'application/json' },
      body: body === undefined ? undefined : JSON.stringify(body),
      credentials: 'same-origin',
    });
  } catch {
    return failed('offline', 0, 'There is no connection. What you typed is kept here; try again.');
  }
  let data: unknown = null;
  try {
    data = response.status === 204 ? null : await response.json();
  } catch {
    return failed(
      'strange',
      response.status,
      'The answer did not come from this program. What you typed is kept here; check the network and try again.',
    );
  }
  if (response.ok) return { ok: true, status: response.status, data };
  const problem = isRecord(data) ? data : {};
  const code =
    typeof problem.code === 'string' && problem.code in errorCodes
      ? (problem.code as ErrorCode)
      : ('internal' as const);
  return {
    ok: false,
    status: response.status,
    code,
    sentence: typeof problem.sentence === 'string' ? problem.sentence : errorCodes[code].sentence,
    fields: fieldsOf(problem.fields),
    detail: problem.detail ?? null,
    incident: typeof problem.incident === 'string' ? problem.incident : null,
  };
}

export const postJson = (path: string, body?: unknown): Promise<Posted> => askJson('POST', path, body ?? {});

/** Reads one text field out of an answer whose shape the caller knows. */
export const textOf = (data: unknown, key: string): string | null => {
  const value = isRecord(data) ? data[key] : undefined;
  return typeof value === 'string' ? value : null;
};
