/** An SVG file taken in as its text (`with { loader: 'text' }`). */
declare module '*.svg' {
  const text: string;
  export default text;
}
