#include "core/document/worksheet.hpp"
