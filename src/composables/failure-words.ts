import { ApiProblem, NoAnswerError } from '#src/api/http.ts';

export interface FailureWords {
  title: string;
  detail: string;
  /** Names the request in the server's log, where the server was at fault. */
  instance: string | null;
  /** Whether the same request may work if it is sent again. */
  canRetry: boolean;
}

/** A failure in words for a person, whatever was thrown. */
export function failureWords(failure: unknown): FailureWords {
  if (failure instanceof ApiProblem) {
    const { title, detail, status, instance } = failure.problem;
    const isServerFault = status >= 500;
    return {
      title,
      detail,
      instance: isServerFault ? instance : null,
      canRetry: isServerFault || status === 429,
    };
  }
  if (failure instanceof NoAnswerError) {
    return {
      title: 'No answer from the server',
      detail: 'Check the connection. Nothing you typed is lost.',
      instance: null,
      canRetry: true,
    };
  }
  return {
    title: 'This did not work',
    detail:
      'Something went wrong in this page. Load it again; if it stays, tell whoever runs Oxymel for you.',
    instance: null,
    canRetry: true,
  };
}
