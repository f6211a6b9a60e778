import { formatPercent } from "@/components/ui/format";
import { Section } from "@/components/ui/section";
import { LedgerTable } from "@/components/ui/table";
import { rankWords, upperHalfTogether } from "./rank-words";

const examples = [0, 0.1, 0.2, 0.3, 0.5, 0.7, 0.9];

/** What a rank correlation is, for somebody who has to choose one. */
export function RankMeaning() {
  return (
    <Section
      title={`A rank correlation of 0.3: in the upper half together ${Math.round(100 * upperHalfTogether(0.3))} times in 100, not 50`}
      note="Only the order of the trials counts, not the shape of either range, so one figure serves fields of any size."
    >
      <div className="rank-meaning">
        <div className="grid content-start gap-3 text-13">
          <p>
            Take two reservoirs. With nothing in common, when one comes out above its P50 the other
            does so half the time. At 0.3 it does so three times in five; at 0.7 three times in
            four.
          </p>
          <p>
            Two reservoirs anywhere share what the whole portfolio has in common. Two of one basin
            share what the basin has in common instead, which includes it. Each shared factor they
            both have comes on top. A field cannot share more than all of its spread: a set that
            asks for it is refused, with the field and its factors named.
          </p>
          <p>
            Whole trials are re-ordered, so a reservoir keeps its own range and its gas stays with
            its condensate.
          </p>
        </div>
        <LedgerTable caption="What a rank correlation means">
          <thead>
            <tr>
              <th scope="col" className="right">
                Rank correlation
              </th>
              <th scope="col" className="right">
                Upper half together
              </th>
            </tr>
          </thead>
          <tbody>
            {examples.map((rank) => (
              <tr key={rank}>
                <th scope="row" className="right">
                  {rankWords(rank)}
                </th>
                <td className="right">{formatPercent(upperHalfTogether(rank))}</td>
              </tr>
            ))}
          </tbody>
        </LedgerTable>
      </div>
    </Section>
  );
}
