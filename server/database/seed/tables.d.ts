/** Tables under data-seeds are bundled as text. */
declare module '*.tsv' {
  const text: string
  export default text
}
