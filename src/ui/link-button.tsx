import { Link, type LinkProps } from 'react-router-dom';
import { type ButtonSize, type ButtonVariant, buttonLook } from './button-look.ts';

type LinkButtonProps = LinkProps & { variant?: ButtonVariant; size?: ButtonSize };

/** Goes somewhere and looks like a button. For a file of the server, pass `reloadDocument` and `download`. */
export function LinkButton({ variant = 'plain', size = 'normal', className, ...rest }: LinkButtonProps) {
  return <Link {...rest} className={buttonLook(variant, size, className)} />;
}
