/** What the global set-ups hand to the tests; read with `inject` of Vitest. */
declare module 'vitest' {
  interface ProvidedContext {
    postgresAdminUrl: string;
    baseUrl: string;
  }
}

export {};
