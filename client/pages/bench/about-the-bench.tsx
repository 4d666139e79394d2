/** For visitors: what the bench is for. */
export function AboutTheBench() {
  return (
    <>
      <p>
        The bench is where your parts lie that are on no machine: each with its photos, its marks and what they mean, the machine it was found on and how it is. Nobody but you sees a
        part until you say otherwise.
      </p>
      <p>Photograph a mark, read it, and see when the part can have been poured.</p>
    </>
  );
}
