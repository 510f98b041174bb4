/** The program's version as health and the OpenAPI document name it; the same as in package.json. */
export const appVersion = '0.1.0';
