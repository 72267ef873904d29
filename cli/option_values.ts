/**
 * Option values as the parser hands them to a command.
 *
 * @module
 */

/** By camel-case name; a switch is true, a repeatable option a list, one not given undefined. */
export type OptionValues = Readonly<Record<string, string | string[] | boolean | undefined>>;
