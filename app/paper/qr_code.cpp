#include "app/paper/qr_code.h"

#include <memory>

#include <qrencode.h>

namespace unstring {

void draw_qr(QPainter& painter, double x, double y, double side, const QString& text) {
    const QByteArray bytes = text.toUtf8();
    const std::unique_ptr<QRcode, decltype(&QRcode_free)> code(
        QRcode_encodeData(static_cast<int>(bytes.size()),
                          reinterpret_cast<const unsigned char*>(bytes.constData()), 0, QR_ECLEVEL_M),
        &QRcode_free);
    if (code == nullptr) return;
    const double cell = side / code->width;
    for (int row = 0; row < code->width; ++row)
        for (int column = 0; column < code->width; ++column)
            if ((code->data[row * code->width + column] & 1) != 0)
                painter.fillRect(QRectF(x + column * cell, y + row * cell, cell * 1.02, cell * 1.02),
                                 Qt::black);
}

} // namespace unstring
