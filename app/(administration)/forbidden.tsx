export { ForbiddenPage as default } from "@/app/_workspace/forbidden-page";
