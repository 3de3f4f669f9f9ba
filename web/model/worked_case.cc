#include "web/model/worked_case.h"

namespace rejoinder {

const char* worked_case() { return "rejoinder = 1\n"; }

}  // namespace rejoinder
