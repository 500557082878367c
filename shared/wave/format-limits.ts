/** More channels than this is no format but damage. Apart from the schema, so that reading needs no zod. */
export const maxChannels = 1024;
