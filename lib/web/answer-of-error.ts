import 'server-only';
import { isDatabaseAway } from '@/db/errors';
import { Refusal, type RefusalCode } from '@/lib/refusal';
import { DatabaseAway } from './database-away';
import { reportFault } from './report-fault';

export interface BadNews {
  code: RefusalCode | 'fault';
  message: string;
  fields: Readonly<Record<string, string>>;
}

/** What a reader is told of an error: a refusal's own sentence, that the database is away, or where the log has it. */
export function answerOfError(where: string, error: unknown): BadNews {
  if (error instanceof Refusal) return { code: error.code, message: error.message, fields: error.fields };
  if (error instanceof DatabaseAway || isDatabaseAway(error))
    return {
      code: 'unavailable',
      message: 'The database does not answer just now. Nothing was changed; try again in a moment.',
      fields: {},
    };
  const mark = reportFault(where, error);
  return { code: 'fault', message: `Something failed on our side. The log has it under ${mark}.`, fields: {} };
}
