// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/page.h"

namespace evenstroke {

Page::Page(Workplace& workplace, QWidget* parent) : QWidget(parent), workplace_(workplace)
{
    setFocusPolicy(Qt::StrongFocus);
}

void Page::print(QPrinter&) {}

} // namespace evenstroke
