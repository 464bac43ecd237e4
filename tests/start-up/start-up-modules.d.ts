// Types of the start-up scripts that the tests call; the scripts themselves are plain JavaScript, run before any tool.

type Noted = { pid: number; started: string; boot: string; address?: string };

declare module '*/start-up/locks.mjs' {
  type Held = { tell(more: Record<string, unknown>): void; release(): void };
  export function takeLock(
    path: string,
    about?: Record<string, unknown>,
  ): { held: Held; heldBy?: undefined } | { held?: undefined; heldBy: Noted };
  export function withLock<T>(path: string, work: () => Promise<T>): Promise<T>;
}

declare module '*/start-up/processes.mjs' {
  export function identify(pid: number): Noted;
  export function isSameProcess(noted: Noted): boolean;
}

declare module '*/start-up/ports.mjs' {
  type Options = { taken?: Set<number>; isFree?: (port: number) => Promise<boolean> };
  export function choosePort(wish: number, options?: Options): Promise<number>;
  export function chooseSitePort(
    asked: number | undefined,
    options?: Options,
  ): Promise<{ port: number; moved: boolean }>;
  export function rememberPorts(
    file: string,
    names: readonly string[],
    sitePort: number,
    options?: Options,
  ): Promise<Record<string, number>>;
}

declare module '*/start-up/settings.mjs' {
  export function readSettings(
    env: Record<string, string | undefined>,
    args: readonly string[],
    project?: string,
  ): { mode: string; data: string; isDemonstration: boolean; askedPort?: number };
}

declare module '*/start-up/secrets.mjs' {
  type What = { isDemonstration: boolean; withDatabase: boolean };
  export function keepSecrets(file: string, what: What): Record<string, string>;
}

declare module '*/start-up/environment.mjs' {
  type Environment = Record<string, string | undefined>;
  export function appEnvironment(parts: {
    env: Environment;
    settings: { mode: string; data: string; isDemonstration: boolean };
    port: number;
    database: { url: string; ownerUrl: string };
    secrets: Record<string, string>;
    ports: Record<string, number>;
  }): Environment;
}

declare module '*/start-up/install.mjs' {
  type Packages = Record<string, { version?: string; optional?: boolean; extraneous?: boolean }>;
  export function agrees(locked: { packages: Packages }, installed: { packages: Packages }): boolean;
}

declare module '*/start-up/build.mjs' {
  export function hashSources(project: string, sources?: readonly string[]): string;
  export function isBuildCurrent(project: string): boolean;
}

declare module '*/start-up/words.mjs' {
  export function alreadyRunning(holder: { pid: number; address?: string }, data: string): string;
}

declare module '*/support/checks.mjs' {
  type Report = {
    success: boolean;
    numPassedTests: number;
    numFailedTests: number;
    numPendingTests: number;
    numTodoTests: number;
    testResults: { status: string; assertionResults: unknown[] }[];
  };
  export function countReport(
    report: Report,
    exitCode: number,
  ): { passed: number; failed: number; skipped: number };
}
