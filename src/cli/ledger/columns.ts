/** Text in columns of characters (code points). */

/** Padded on the right, or cut in the middle with `ellipsis`, to exactly `width`: the end of a name is its face. */
export function fitLeft(text: string, width: number, ellipsis: string): string {
  const characters = [...text];
  if (characters.length > width) {
    const tail = Math.floor((width - 1) / 2);
    return (
      characters.slice(0, width - 1 - tail).join('') + ellipsis + characters.slice(characters.length - tail).join('')
    );
  }
  return text + ' '.repeat(width - characters.length);
}

/** Numbers padded so that their decimal points stand under each other; texts without one count as whole numbers. */
export function alignDecimals(numbers: readonly string[]): string[] {
  const wholeWidth = Math.max(0, ...numbers.map((text) => wholeOf(text).length));
  const fractionWidth = Math.max(0, ...numbers.map((text) => text.length - wholeOf(text).length));
  return numbers.map((text) => {
    const whole = wholeOf(text);
    return whole.padStart(wholeWidth) + text.slice(whole.length).padEnd(fractionWidth);
  });
}

function wholeOf(text: string): string {
  const point = text.indexOf('.');
  return point < 0 ? text : text.slice(0, point);
}
