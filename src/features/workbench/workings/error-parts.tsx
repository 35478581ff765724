import type { Working } from "#shared/api/workings.ts";
import { figure } from "./figures.ts";

/** A share of the value in percent, of a magnitude in mag, to three digits. */
const sizeText = (size: number, isMagnitude: boolean): string =>
  isMagnitude
    ? `${figure(Number(size.toPrecision(3)))} mag`
    : `${figure(Number((100 * size).toPrecision(3)))} %`;

/** What each source of error adds, and what they come to together. */
export const ErrorParts = ({ working }: { working: Working }) => {
  const { unit, errorParts } = working;
  const isMagnitude = unit === "mag";
  const total = Math.hypot(...errorParts.map(({ size }) => size ?? Number.NaN));
  return (
    <table className="w-full text-[13px]">
      <caption className="pb-1 text-left text-xs text-soft">
        Each alone; together they add in quadrature.
      </caption>
      <tbody className="[&_td]:py-0.5 [&_th]:py-0.5 [&_th]:pr-3">
        {errorParts.map(({ source, size }) => (
          <tr key={source}>
            <th scope="row" className="text-left font-normal text-soft">
              {source}
            </th>
            <td className="w-16">
              {size === null || !(total > 0) ? null : (
                <span aria-hidden="true" className="block h-1.5 bg-hair">
                  <span className="block h-full bg-edge" style={{ width: `${100 * (size / total) ** 2}%` }} />
                </span>
              )}
            </td>
            <td className="pl-3 text-right font-mono text-[12.5px] whitespace-nowrap">
              {size === null ? "no error given" : sizeText(size, isMagnitude)}
            </td>
          </tr>
        ))}
        {Number.isNaN(total) ? null : (
          <tr className="border-t border-rule">
            <th scope="row" className="text-left font-normal">
              together
            </th>
            <td />
            <td className="pl-3 text-right font-mono text-[12.5px] whitespace-nowrap">
              {sizeText(total, isMagnitude)}
            </td>
          </tr>
        )}
      </tbody>
      {Number.isNaN(total) ? (
        <tfoot>
          <tr>
            <td colSpan={3} className="pt-1 text-xs text-soft">
              The value has no error: a source of it has none given, and none is made up.
            </td>
          </tr>
        </tfoot>
      ) : (
        <tfoot>
          <tr>
            <td colSpan={3} className="pt-1 text-xs text-soft">
              The bars show shares of the variance.
            </td>
          </tr>
        </tfoot>
      )}
    </table>
  );
};
