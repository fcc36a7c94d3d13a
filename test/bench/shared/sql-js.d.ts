/** The part of sql.js that the benches use; the package carries no types. */
declare module 'sql.js' {
	export type Statement = {
		run(values: readonly (number | string)[]): void;
		bind(values: readonly (number | string)[]): boolean;
		step(): boolean;
		get(): (number | string | null)[];
		reset(): void;
	};
	export type Database = { run(sql: string, values?: readonly (number | string)[]): void; prepare(sql: string): Statement };
	export default function initSqlJs(): Promise<{ readonly Database: new () => Database }>;
}
