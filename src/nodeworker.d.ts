/** `import url from './task.ts?nodeworker'` gives the file: URL of a bundled worker entry. */
declare module '*?nodeworker' {
  const url: string;
  export default url;
}
