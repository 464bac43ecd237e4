// Types of further start-up scripts that these tests call.

declare module '*/start-up/environment.mjs' {
  type Where = {
    env: Record<string, string | undefined>;
    settings: { publicAddress?: string; data: string };
    port: number;
    secrets: Record<string, string>;
    ports: Record<string, number>;
  };
  export function cardPageOrigin(
    settings: { publicAddress?: string | undefined },
    ports: Record<string, number>,
  ): string;
  export function standInEnvironments(
    where: Where,
  ): Record<'payment-service', Record<string, string | undefined>>;
}

declare module '*/start-up/half-filled.mjs' {
  type Connection = { bin: string; port: number; password: string };
  type Roles = { name: string; ownerPassword: string; appPassword: string; ownerMayCreate?: boolean };
  export function isHalfFilled(connection: Connection, name: string): Promise<boolean>;
  export function beginAgain(connection: Connection, roles: Roles): Promise<void>;
}

declare module '*/start-up/cluster-folder.mjs' {
  export function findBinaries(folder: string): string;
}
