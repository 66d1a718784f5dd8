#include "core/page/page.hpp"
