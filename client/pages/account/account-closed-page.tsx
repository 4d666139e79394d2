import { FormPage } from '../../features/people/form-page.tsx';
import { Outcome } from '../../features/people/outcome.tsx';
import { paths } from '../../lib/paths.ts';
import { ButtonLink } from '../../ui/button.tsx';

export function Component() {
  return (
    <FormPage title="Your account is closed">
      <Outcome title="It is done" action={<ButtonLink to={paths.catalogue()}>Open the catalogue</ButtonLink>}>
        <p>What was yours alone is gone. What you entered for everybody stays, under “a former member”. A last letter says so.</p>
      </Outcome>
    </FormPage>
  );
}
