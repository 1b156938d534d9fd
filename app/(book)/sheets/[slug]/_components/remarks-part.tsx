import { Prose } from '@/components/ui/prose';
import { shortDate } from '@/lib/entries/dates';
import type { SheetView } from '@/lib/entries/entry';
import { Part } from './part';

export const RemarksPart = ({ sheet, figure }: { sheet: SheetView; figure: number }) => (
  <Part id="remarks" figure={figure} name="Remarks">
    {sheet.remarks.length === 0 ? (
      <p className="cap">Nobody has remarked on this sheet.</p>
    ) : (
      sheet.remarks.map((remark) => (
        <div key={`${remark.author}:${remark.at}`} className="talk">
          <div>
            <b>{remark.author}</b>
            <div className="small q">
              {remark.role}, {shortDate(remark.at)}
              {remark.part && <>, on {remark.part}</>}
            </div>
          </div>
          <Prose text={remark.text} />
        </div>
      ))
    )}
  </Part>
);
