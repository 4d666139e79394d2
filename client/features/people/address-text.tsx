/** An e-mail address that breaks after its @ where a line is too short for it. */
export function AddressText({ email }: { readonly email: string }) {
  const at = email.lastIndexOf('@') + 1;
  return (
    <span className="wrap-anywhere">
      {email.slice(0, at)}
      <wbr />
      {email.slice(at)}
    </span>
  );
}
