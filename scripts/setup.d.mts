/** Folder of the PostgreSQL programs; ends the program when there is none. */
export function findPostgres(): string;
export function requireNode(): void;
export function ensureNpmPackages(): void;
export function ensureDebianPackages(options: { wantsBrowser: boolean }): void;
export function giveUp(message: string): never;
export const projectDirectory: string;
