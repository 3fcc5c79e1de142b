import type { ButtonHTMLAttributes, Ref } from "react";

interface Props extends ButtonHTMLAttributes<HTMLButtonElement> {
  kind?: "plain" | "primary" | "quiet" | "danger";
  small?: boolean;
  ref?: Ref<HTMLButtonElement>;
}

const classByKind = { plain: "", primary: "button-primary", quiet: "button-quiet", danger: "button-danger" };

export function Button({ kind = "plain", small = false, type = "button", className = "", ...rest }: Props) {
  return (
    <button
      type={type}
      className={`button ${classByKind[kind]} ${small ? "button-small" : ""} ${className}`}
      {...rest}
    />
  );
}
