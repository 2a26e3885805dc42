/** A button that shows a sign alone: its name is heard, and seen on pointing at it. */
import type { ComponentProps } from "preact";
import { Icon } from "./icon";

interface SignButtonProps {
  readonly name: string;
  readonly sign: ComponentProps<typeof Icon>["name"];
  readonly disabled?: boolean;
  readonly onClick: () => void;
}

export function SignButton({ name, sign, disabled = false, onClick }: SignButtonProps) {
  return (
    <button type="button" class="sign" aria-label={name} title={name} disabled={disabled} onClick={onClick}>
      <Icon name={sign} />
    </button>
  );
}
