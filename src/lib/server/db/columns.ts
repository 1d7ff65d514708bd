import { customType, datetime, varchar } from 'drizzle-orm/mysql-core';

/** A key made by `newId()`. */
export const idColumn = (name: string) => varchar(name, { length: 32 });

/** A moment in UTC with milliseconds. */
export const moment = (name: string) => datetime(name, { mode: 'date', fsp: 3 });

/** A typed document as JSON text. MariaDB's own json type is text too, and the driver hands it out unparsed. */
export const document = <T>(name: string) =>
	customType<{ data: T; driverData: string }>({
		dataType: () => 'longtext',
		toDriver: (value) => JSON.stringify(value),
		fromDriver: (value) => JSON.parse(value) as T
	})(name);

/** The bytes of an issued file. */
export const bytes = customType<{ data: Buffer; driverData: Buffer }>({ dataType: () => 'longblob' });

/** Hexadecimal SHA-256. */
export const sha256Column = (name: string) => varchar(name, { length: 64 });
