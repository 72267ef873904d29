/** Version of nearkin, the same as in deno.json (a test compares). */
export const VERSION = "0.1.0";
