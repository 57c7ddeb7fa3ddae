/**
 * Server to client: what a server without a disk of its own asks of the editor, whose files may lie anywhere.
 *
 * Every address is the editor's. Each answer is data; nothing of it is ever run but the parser that the extension itself ships.
 */
import * as v from "valibot";

/** The text of a file. Gives a string, or `null` where there is no such file or none that can be read. */
export const READ_FILE = "loadmark/readFile";

/** The files below a folder that may hold declarations. Gives their addresses. */
export const LIST_SOURCES = "loadmark/listSources";

/** The shipped parser as a module that a worker can import. Gives its address. */
export const FIND_PARSER = "loadmark/findParser";

export const addressSchema = v.object({ uri: v.string() });
export const textSchema = v.nullable(v.string());
export const addressesSchema = v.array(v.string());
export const moduleAddressSchema = v.pipe(v.string(), v.startsWith("blob:"));
