import { withRoute } from "@/app/_server/with-route";
import { checkHealth } from "@/services/health";

/** For `npm start`, load balancers and monitors: 200 while requests can be answered. */
export const GET = withRoute({ may: "public", handler: checkHealth });
